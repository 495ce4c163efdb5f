import { complaintLine } from '../../src/design/complaint.ts';
import { readDesign } from '../../src/design/read.ts';
import { blankDesign } from '../../src/state/blank-design.ts';
import { storageFailure } from '../../src/storage/failure.ts';
import type { Keeper, Opened } from '../../src/storage/keeper.ts';
import type { Damaged, ProjectStore } from '../../src/storage/project-store.ts';
import type { ProjectEntry } from '../../src/storage/record.ts';
import { keyOfItem, shelfKey } from '../../src/storage/shelf.ts';
import type { ProjectAct } from '../shared/events.ts';
import { saveFile } from '../shared/save-file.ts';
import type { Incoming } from './incoming.ts';

/** What an act on the projects came to: a sentence for the person; and, where something unsaved stands in the way, the same act once more without regard for it. */
export interface DeskOutcome {
  said: string;
  urgent?: boolean;
  /** another project is on the page now */ opened?: boolean;
  regardless?: () => Promise<DeskOutcome>;
}

/** Refusals of a backup that are told one by one. */
const MOST_TOLD = 8;

/** Carries out what a person does with projects and files: knows the store and the keeper, and no element. */
export class ProjectDesk {
  entries: ProjectEntry[] = [];
  damaged: Damaged[] = [];
  readonly #store: ProjectStore;
  readonly #keeper: Keeper;

  constructor(store: ProjectStore, keeper: Keeper) {
    this.#store = store;
    this.#keeper = keeper;
  }

  /** Reads the lists anew. */
  async look(): Promise<void> {
    this.entries = await this.#store.list();
    this.damaged = await this.#store.damaged();
  }

  /** Never rejects: what the browser throws comes back as a sentence. */
  async act(act: ProjectAct): Promise<DeskOutcome> {
    try {
      const outcome = await this.#do(act);
      await this.look();
      return outcome;
    } catch (error) {
      return { said: storageFailure(error).sentence, urgent: true };
    }
  }

  /** Opens a design as a project of its own. */
  async open(name: string, design: Parameters<Keeper['create']>[1], abandon = false): Promise<DeskOutcome> {
    const opened = await this.#keeper.create(name, design, abandon);
    return this.#outcome(opened, `Opened ${this.#keeper.project.name}.`, () => this.open(name, design, true));
  }

  /** Takes a text that came to the page: a design or a backup. */
  async take({ text, name }: Incoming): Promise<DeskOutcome> {
    if (/"format"\s*:\s*"halfmark-backup\//.test(text.slice(0, 300))) return this.act({ act: 'restore-backup', text });
    const reading = readDesign(text);
    const what = name === '' ? 'The pasted text' : name;
    if (!reading.ok) {
      const more = reading.complaints.length - 1;
      return { said: `${what} was not opened. ${complaintLine(reading.complaints[0])}${more > 0 ? ` (and ${more} more)` : ''}.`, urgent: true };
    }
    return this.open(reading.design.title.trim() || name.replace(/(\.halfmark)?\.json$/i, '') || 'pasted design', reading.design);
  }

  async #do(act: ProjectAct): Promise<DeskOutcome> {
    switch (act.act) {
      case 'open':
        return this.#open(act.id);
      case 'new':
        return this.open('untitled', blankDesign('untitled'));
      case 'rename':
        if (act.id === this.#keeper.project.id) await this.#keeper.rename(act.name);
        else await this.#store.rename(act.id, act.name);
        return { said: `Renamed to ${act.name.trim()}.` };
      case 'copy': {
        // What is typed in the last second belongs to the copy too.
        await this.#keeper.flush();
        const copy = await this.#store.copy(act.id);
        return copy === null ? { said: 'That project is gone.', urgent: true } : { said: `Copied as ${copy.name}.` };
      }
      case 'bin':
        return this.#bin(act.id);
      case 'restore':
        await this.#store.takeOutOfBin(act.id);
        return { said: 'Taken out of the bin.' };
      case 'delete':
        return (await this.#store.delete(act.id)) ? { said: 'Deleted for good.' } : { said: 'Only what is in the bin can be deleted.' };
      case 'backup':
        return this.#backup();
      case 'restore-backup':
        return this.#restoreBackup(act.text);
      case 'rescue': {
        const record = this.damaged.find(({ key }) => key === act.key);
        if (record === undefined) return { said: 'It is gone.' };
        await saveFile(`set-aside-${act.key}.txt`, 'text/plain', new Blob([record.text], { type: 'text/plain' }));
        return { said: 'The text is in a file.' };
      }
      case 'forget':
        await this.#store.deleteDamaged(act.key);
        return { said: 'Forgotten.' };
    }
  }

  async #open(id: string, abandon = false): Promise<DeskOutcome> {
    return this.#outcome(await this.#keeper.open(id, abandon), `Opened ${this.#keeper.project.name}.`, () => this.#open(id, true));
  }

  async #bin(id: string): Promise<DeskOutcome> {
    if (id === this.#keeper.project.id) {
      // Something has to be on the page: the next project, or a new one.
      const next = (await this.#store.list()).find((entry) => entry.binned === null && entry.id !== id);
      const opened = next === undefined ? await this.#keeper.create('untitled', blankDesign('untitled')) : await this.#keeper.open(next.id);
      if (!opened.ok) return { said: opened.why, urgent: true };
    }
    await this.#store.bin(id);
    return { said: 'It is in the bin, and can be taken out again.' };
  }

  async #backup(): Promise<DeskOutcome> {
    await this.#keeper.flush();
    const now = new Date();
    const writing = this.#writtenBackup(now.getTime());
    const outcome = await saveFile(`halfmark-backup-${now.toISOString().slice(0, 10)}.json`, 'application/json', writing.then(({ text }) => new Blob([text], { type: 'application/json' })));
    if (outcome === 'given up') return { said: 'No backup was written.' };
    const { lacking } = await writing;
    return { said: `The backup holds every project, those in the bin too, and your shelf${lacking}.`, ...(lacking === '' ? {} : { urgent: true }) };
  }

  /** The text of a backup that can be read back: one that would be too large for that is written without the steps of undo. */
  async #writtenBackup(now: number): Promise<{ text: string; lacking: string }> {
    const [{ writeBackup, withoutUndo, LARGEST_FILE }, records, shelf] = await Promise.all([import('../../src/storage/backup.ts'), this.#store.all(), this.#store.shelf()]);
    const whole = writeBackup(records, now, shelf);
    if (whole.length <= LARGEST_FILE) return { text: whole, lacking: '' };
    const text = writeBackup(records.map(withoutUndo), now, shelf);
    const limit = `${LARGEST_FILE / 1e6} MB`;
    return { text, lacking: `, without the steps of undo: with them it would have more than the ${limit} that can be read back${text.length > LARGEST_FILE ? ', and without them it still has; empty the bin, or keep large projects as files of their own' : ''}` };
  }

  /** Adds what the backup holds; nothing that is here is replaced. */
  async #restoreBackup(text: string): Promise<DeskOutcome> {
    const { readBackup } = await import('../../src/storage/backup.ts');
    const reading = readBackup(text);
    if (!reading.ok) return { said: reading.message, urgent: true };
    await this.#store.createAll(
      reading.projects.map(({ name, designText, history, view, variants, created, changed, binned }) => ({ name, content: { designText, history, view, variants }, times: { created, changed, binned } })),
    );
    // What is on the shelf under the same name stays: the backup may be old.
    const there = new Set((await this.#store.shelf()).map(({ key }) => key));
    const fresh = reading.shelf.filter((item) => !there.has(shelfKey(keyOfItem(item))));
    await this.#store.shelve(fresh);
    const kept = reading.shelf.length - fresh.length;
    const shelf = `${fresh.length === 0 ? '' : ` ${fresh.length} put on your shelf.`}${kept === 0 ? '' : ` ${kept} of the shelf ${kept === 1 ? 'was' : 'were'} there already and stayed as ${kept === 1 ? 'it is' : 'they are'}.`}`;
    const more = reading.refused.length - MOST_TOLD;
    const refused = `${reading.refused.slice(0, MOST_TOLD).map(({ name, why }) => ` ${name} was left out: ${why}.`).join('')}${more > 0 ? ` ${more} more were left out.` : ''}`;
    return { said: `${reading.projects.length === 1 ? 'One project' : `${reading.projects.length} projects`} added from the backup.${shelf}${refused}`, ...(refused === '' ? {} : { urgent: true }) };
  }

  #outcome(opened: Opened, said: string, regardless: () => Promise<DeskOutcome>): DeskOutcome {
    if (!opened.ok) return { said: opened.why, urgent: true, ...(opened.unsaved ? { regardless } : {}) };
    return { said: opened.recovered ? `${said} Changes that the last visit had no time to save were taken up; undo takes them back.` : said, opened: true };
  }
}
