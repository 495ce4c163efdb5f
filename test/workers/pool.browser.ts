import { expect } from 'chai';
import { runHere } from '../../src/batch/job.ts';
import { starters } from '../../src/design/starters/index.ts';
import { planMap, mapJob } from '../../src/map/map-job.ts';
import { planSweep, sweepJob, sweepResult, type SweepPoint } from '../../src/sweep/sweep.ts';
import { startPool } from '../../src/workers/start-pool.ts';
import type { RegimeMap } from '../../src/map/regime-map.ts';

const { design } = starters[1];
const request = { axis: { variable: 'temperature', from: '250 K', to: '400 K', points: 40 }, figures: ['layers.drift.n_cm3'] };

describe('the pool of the page', function () {
  this.timeout(60_000);

  it('sweeps over module workers to the same digits as one thread', async () => {
    const planned = planSweep(design, request);
    if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
    const job = sweepJob(planned.plan);
    const pool = startPool(2);
    let done = 0;
    const { values } = await pool.run<SweepPoint[]>({ kind: 'sweep', design, request }, job, { onProgress: (progress) => (done = progress.done) });
    const here = await runHere(job);
    expect(done).to.equal(40);
    expect(sweepResult(planned.plan, values)).to.deep.equal(sweepResult(planned.plan, here.values));
    pool.close();
    expect(pool.members).to.equal(0);
  });

  it('brings a map of typed arrays back whole', async () => {
    const planned = planMap(design, { layer: 0, columns: 20, rows: 20 });
    if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
    const pool = startPool(1);
    const { values } = await pool.run<RegimeMap | null>({ kind: 'map', design, request: planned.plan.request }, mapJob(planned.plan));
    expect(values.get(0)!.ecMinusEf).to.be.instanceOf(Float64Array);
    expect(values.get(0)!.regime.length).to.equal(400);
    pool.close();
  });

  it('stops when it is told to', async () => {
    const planned = planSweep(design, { ...request, axis: { ...request.axis, points: 4000 } });
    if (!planned.ok) throw new Error(JSON.stringify(planned.complaints));
    const pool = startPool(2);
    const stop = new AbortController();
    const outcome = await pool.run<SweepPoint[]>({ kind: 'sweep', design, request: { ...request, axis: { ...request.axis, points: 4000 } } }, sweepJob(planned.plan), { signal: stop.signal, onChunk: () => stop.abort() });
    expect(outcome.stopped).to.equal(true);
    expect(sweepResult(planned.plan, outcome.values).done).to.be.greaterThan(0);
    pool.close();
  });
});
