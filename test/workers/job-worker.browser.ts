import { expect } from 'chai';
import { JobClient } from '../../src/workers/job-client.ts';
import { startJobWorker } from '../../src/workers/job-start.ts';
import { contactDesign } from '../requirements/designs.ts';

const design = contactDesign((d) => {
  d.requirements = [{ quantity: 'sheetResistance', of: 'cap', max: '250 ohm' }];
});

describe('the worker of the jobs in a browser', () => {
  let client: JobClient;
  beforeEach(() => (client = new JobClient(startJobWorker)));
  afterEach(() => client.close());

  it('judges, then sizes in the same worker, telling what it sees', async () => {
    const judged = await client.run('judge', { design, options: { tolerances: 'none', samples: 0 } }).outcome;
    expect(judged.kind === 'done' && judged.value.kind === 'judged' && judged.value.requirements[0].quantity).to.equal('sheetResistance');
    let seen = 0;
    const sized = await client.run('size', { design, options: { variable: 'tcap', tolerances: 'stated' } }, (progress) => (seen += progress.seen.length)).outcome;
    if (sized.kind !== 'done' || sized.value.kind !== 'sized') throw new Error(JSON.stringify(sized));
    expect(sized.value.intervals).to.have.length(1);
    expect(seen).to.be.greaterThan(0);
  }).timeout(60_000);

  it('is stopped at once', async () => {
    const run = client.run('size', { design, options: { variable: 'tcap' } });
    run.cancel();
    expect(await run.outcome).to.deep.equal({ kind: 'dropped' });
  });
});
