import { expect } from 'chai';
import { starters } from '../../src/design/starters/index.ts';
import { setThickness } from '../../src/state/commands/index.ts';
import { SolverClient } from '../../src/workers/client.ts';
import { startSolveWorker } from '../../src/workers/start-worker.ts';

const [{ design }] = starters;

describe('the worker that solves', function () {
  this.timeout(20_000);
  let client: SolverClient;
  beforeEach(() => void (client = new SolverClient(startSolveWorker)));
  afterEach(() => client.close());

  it('answers with a result that can cross to the page, and with complaints for a design with a mistake', async () => {
    const outcome = await client.solve(design);
    expect(outcome).to.have.nested.property('answer.kind', 'result');
    expect(outcome).to.have.nested.property('answer.result.title', design.title);
    const wrong = await client.solve(setThickness(design, 0, '200 mn'));
    expect(wrong).to.have.nested.property('answer.complaints[0].path', 'layers[0].thickness');
  });

  it('gives the same figures whether it starts from the last answer or from nothing', async () => {
    const near = setThickness(design, 0, '310 nm');
    await client.solve(design);
    const warm = await client.solve(near);
    client.cancel();
    const fresh = new SolverClient(startSolveWorker);
    const cold = await fresh.solve(near);
    fresh.close();
    const built = (outcome: typeof warm) => (outcome.kind === 'answered' && outcome.answer.kind === 'result' ? outcome.answer.result.junctions.map((junction) => junction.builtin_V!) : []);
    const field = (outcome: typeof warm) => (outcome.kind === 'answered' && outcome.answer.kind === 'result' ? outcome.answer.result.junctions.map((junction) => junction.peak_field_V_cm) : []);
    expect(built(warm)).to.have.length(design.layers.length - 1);
    built(warm).forEach((value, i) => expect(value).to.be.closeTo(built(cold)[i], 1e-9));
    // Two meshes, each within 0.1 mV: the field at an interface agrees to a part in a hundred.
    field(warm).forEach((value, i) => expect(value / field(cold)[i]).to.be.closeTo(1, 0.01));
  });

  it('is stopped in the middle of a solve, and the next question is answered by another', async () => {
    const first = client.solve(design);
    client.cancel();
    expect(await first).to.deep.equal({ kind: 'dropped' });
    expect(await client.solve(design)).to.have.nested.property('answer.kind', 'result');
  });
});
