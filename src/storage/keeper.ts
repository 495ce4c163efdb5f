import { complaintLine } from '../design/complaint.ts';
import { readDesign } from '../design/read.ts';
import type { Design } from '../design/types.ts';
import { writeDesign } from '../design/write.ts';
import type { Session } from '../state/session.ts';
import { Autosave, type SavingState } from './autosave.ts';
import { storageFailure } from './failure.ts';
import { dropLastWords, leaveLastWords, takeLastWords } from './last-words.ts';
import type { Content, ProjectStore, SaveOutcome } from './project-store.ts';
import type { ProjectRecord } from './record.ts';
import { Tabs, type TabNotice } from './tabs.ts';

/** The project that is open. Without an id it is not in the database yet, and lives in memory only. */
export interface OpenProject {
  id: string | null;
  name: string;
  revision: number;
}

/** How opening ended. */
export type Opened = { ok: true; /** unsaved changes of the last visit were taken up */ recovered: boolean } | { ok: false; why: string; /** because of what is unsaved here */ unsaved?: true };

/**
 * Keeps the session's project: opens it, saves it as one works, notices other tabs, and leaves nothing behind when the page goes away.
 * Fires plain events: `project` (another one, or another name) and `saving`.
 */
export class Keeper extends EventTarget {
  #project: OpenProject = { id: null, name: '', revision: 0 };
  /** counts the projects opened, so that a save that ends late is not taken for the next one's */ #opened = 0;
  readonly #tab: string = crypto.randomUUID();
  /** the design as this tab last read or saved it */ #base = '';
  readonly #session: Session;
  readonly #store: ProjectStore;
  readonly #tabs: Tabs;
  readonly #autosave: Autosave;
  readonly #touch = (): void => this.#autosave.touch();

  /** @param channel  name that tabs meet under; tests give their own */
  constructor(session: Session, store: ProjectStore, channel?: string) {
    super();
    this.#session = session;
    this.#store = store;
    this.#tabs = new Tabs((notice) => void this.#heard(notice), channel);
    this.#autosave = new Autosave(
      () => this.#save(),
      () => this.dispatchEvent(new Event('saving')),
    );
    for (const what of ['design', 'view']) session.addEventListener(what, this.#touch);
  }

  get project(): OpenProject {
    return this.#project;
  }
  /** Whether leaving now would lose something: it is not saved, and saving does not work. */
  get atRisk(): boolean {
    return this.#autosave.unsaved && (this.saving.kind === 'failed' || this.saving.kind === 'conflict');
  }
  get saving(): SavingState {
    return this.#autosave.state;
  }

  /** Opens the project that was open last, or the one changed last. @returns false when there is none, or nothing can be read */
  async openLast(): Promise<Opened> {
    try {
      const last = await this.#store.setting('last');
      const entries = (await this.#store.list()).filter((entry) => entry.binned === null);
      for (const { id } of [...entries.filter((entry) => entry.id === last), ...entries.filter((entry) => entry.id !== last)]) {
        const opened = await this.open(id);
        if (opened.ok) return opened;
      }
      return { ok: false, why: 'there is no project yet' };
    } catch (error) {
      return { ok: false, why: storageFailure(error).sentence };
    }
  }

  /**
   * Opens a project of the database, after what is unsaved of the present one has been saved. If that cannot be, nothing is opened.
   * @param abandon  the person has agreed to lose what cannot be saved
   */
  async open(id: string, abandon = false): Promise<Opened> {
    const held = await this.#leave(abandon);
    if (held !== null) return held;
    const record = await this.#store.get(id);
    if (record === null) return { ok: false, why: 'This project can no longer be read. What is left of it has been set aside.' };
    return this.#take(record);
  }

  /** Puts a design into a new project and opens it. Where the browser keeps nothing the project lives in memory, and `saving` says so. */
  async create(name: string, design: Design, abandon = false): Promise<Opened> {
    const held = await this.#leave(abandon);
    if (held !== null) return held;
    this.#opened++;
    this.#project = { id: null, name, revision: 0 };
    this.#session.open(design);
    this.#autosave.reset();
    this.#autosave.touch();
    await this.#autosave.flush();
    this.dispatchEvent(new Event('project'));
    return { ok: true, recovered: false };
  }

  /** Gives the open project another name. */
  async rename(name: string): Promise<void> {
    const wish = name.trim();
    if (wish === '') return;
    this.#project = { ...this.#project, name: wish };
    const { id } = this.#project;
    if (id !== null) await this.#store.rename(id, wish);
    this.dispatchEvent(new Event('project'));
  }

  /** After a conflict: what is on this page goes on as a project of its own. */
  async keepMineAsCopy(): Promise<void> {
    const { name } = this.#project;
    const content = this.#content();
    const record = await this.#store.create(`${name} (copy)`, content);
    this.#opened++;
    this.#forget();
    this.#project = { id: record.id, name: record.name, revision: record.revision };
    this.#base = content.designText;
    this.#autosave.reset();
    await this.#remember(record.id);
    this.dispatchEvent(new Event('project'));
  }

  /** After a conflict: what the other tab saved replaces what is on this page. */
  async takeTheOther(): Promise<Opened> {
    const { id } = this.#project;
    const record = id === null ? null : await this.#store.get(id);
    if (record === null) return { ok: false, why: 'The other tab has deleted this project: only the one on this page is left.' };
    this.#forget();
    return this.#take(record);
  }

  /** Saves now. For the moment when the page is hidden or left. */
  async flush(): Promise<void> {
    const { id, revision } = this.#project;
    // A page that is being closed may not live to see the transaction's end.
    if (this.#autosave.unsaved && id !== null) leaveLastWords({ id, revision, designText: writeDesign(this.#session.design) }, this.#tab);
    await this.#autosave.flush();
  }

  /** Saves what is unsaved and lets go of the session. */
  async close(): Promise<void> {
    for (const what of ['design', 'view']) this.#session.removeEventListener(what, this.#touch);
    await this.flush();
    this.#tabs.close();
    this.#autosave.reset();
  }

  async #take(record: ProjectRecord): Promise<Opened> {
    const reading = readDesign(record.designText);
    if (!reading.ok) {
      const why = complaintLine(reading.complaints[0]);
      await this.#store.setAside(record.id, why);
      return { ok: false, why: `"${record.name}" can no longer be read (${why}). It has been set aside as it is.` };
    }
    this.#opened++;
    this.#project = { id: record.id, name: record.name, revision: record.revision };
    this.#base = record.designText;
    this.#session.open(reading.design, record);
    this.#autosave.reset();
    await this.#remember(record.id);
    this.dispatchEvent(new Event('project'));
    return { ok: true, recovered: await this.#recover(record) };
  }

  /**
   * Takes up what an earlier visit had no time to save, as a step that can be undone. What was written on top of another revision was the losing side of two
   * tabs: it becomes a project of its own.
   */
  async #recover(record: ProjectRecord): Promise<boolean> {
    let recovered = false;
    for (const { revision, designText } of takeLastWords(record.id)) {
      const reading = readDesign(designText);
      if (!reading.ok || designText === record.designText) continue;
      if (revision === record.revision && !recovered) recovered = this.#session.edit(reading.design, 'changes just before the page was closed');
      else await this.#store.create(`${record.name} (unsaved changes)`, { designText, history: { past: [], future: [] }, view: record.view });
    }
    return recovered;
  }

  /** @returns null when nothing is unsaved any more, else why the present project cannot be left yet */
  async #leave(abandon: boolean): Promise<Opened | null> {
    await this.#autosave.flush();
    if (abandon) this.#forget();
    if (!this.#autosave.unsaved || abandon) return null;
    return { ok: false, why: 'What is on this page is not saved, so nothing else was opened.', unsaved: true };
  }

  /** The person has decided about what this tab had not saved. */
  #forget(): void {
    if (this.#project.id !== null) dropLastWords(this.#project.id, this.#tab);
  }

  #content(): Content {
    return { designText: writeDesign(this.#session.design), history: this.#session.historyRecord, view: this.#session.view };
  }

  async #save(): Promise<SaveOutcome> {
    const opened = this.#opened;
    const content = this.#content();
    const outcome = this.#project.id === null ? await this.#add(content) : await this.#saveOnTop(this.#project.id, content);
    // Another project was opened meanwhile: this outcome is not about it.
    if (opened !== this.#opened) return { kind: 'saved', revision: this.#project.revision };
    // A project that was only in memory has its id now.
    const { id } = this.#project;
    if (outcome.kind === 'saved' && id !== null) {
      this.#base = content.designText;
      dropLastWords(id, this.#tab);
      this.#project = { ...this.#project, revision: outcome.revision };
      this.#tabs.tell({ kind: 'saved', id, revision: outcome.revision });
    }
    return outcome;
  }

  async #saveOnTop(id: string, content: Content): Promise<SaveOutcome> {
    const outcome = await this.#store.save(id, this.#project.revision, content);
    if (outcome.kind !== 'conflict' || outcome.other === null || outcome.other.designText !== this.#base) return outcome;
    // The other tab only looked at the same design from elsewhere: nobody's work is at stake.
    return this.#store.save(id, outcome.other.revision, content);
  }

  async #add(content: Content): Promise<SaveOutcome> {
    const opened = this.#opened;
    try {
      const record = await this.#store.create(this.#project.name, content);
      if (opened !== this.#opened) return { kind: 'saved', revision: 0 };
      this.#project = { id: record.id, name: record.name, revision: record.revision };
      await this.#remember(record.id);
      this.dispatchEvent(new Event('project'));
      return { kind: 'saved', revision: record.revision };
    } catch (error) {
      return { kind: 'failed', failure: storageFailure(error) };
    }
  }

  async #heard({ kind, id, revision }: TabNotice): Promise<void> {
    if (id !== this.#project.id || (kind === 'saved' && revision <= this.#project.revision)) return;
    // What is unsaved here meets the other's save in its own transaction.
    if (this.#autosave.unsaved) return this.#autosave.flush();
    const opened = this.#opened;
    const other = kind === 'saved' ? await this.#store.get(id).catch(() => null) : null;
    if (opened !== this.#opened || this.#autosave.unsaved) return;
    if (other !== null && other.designText === this.#base) this.#project = { ...this.#project, revision: other.revision };
    else this.#autosave.meet(other);
  }

  async #remember(id: string): Promise<void> {
    // Which project was open last is a convenience: its loss is no reason to stop.
    await this.#store.setSetting('last', id).catch(() => {});
  }
}
