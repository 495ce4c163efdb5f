import { complaintLine } from '../design/complaint.ts';
import { readDesign } from '../design/read.ts';
import type { Design } from '../design/types.ts';
import { writeDesign } from '../design/write.ts';
import type { Session } from '../state/session.ts';
import { addVariant, openVariant, takeBackVariant } from '../state/variants.ts';
import { Autosave, type SavingState } from './autosave.ts';
import { storageFailure } from './failure.ts';
import { keptVariants, readVariants, textOfVariant, workOf, LONE } from './kept-variants.ts';
import { dropLastWords, forgetLastWords, hearLastWords, leaveLastWords, rewriteLastWords, type LastWords } from './last-words.ts';
import { Lasting } from './lasting.ts';
import type { Content, ProjectStore, SaveOutcome } from './project-store.ts';
import { isNewer, type ProjectRecord } from './record.ts';
import { Tabs, type TabNotice } from './tabs.ts';

/** Time from a change to its last words, ms: a tab that dies before the save has been made loses no more than this. */
const WORDS_MS = 50;
/** What the session tells when something is to be saved. */
const TOUCHING = ['design', 'view', 'variants'] as const;
/** Saved, by a browser that may clear it. */
const CLEARABLE: SavingState = { kind: 'saved', clearable: true };
/** Stands in last words for a project that the database does not know yet. */
const NOWHERE = '';

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
  /** the id that the open project gets in the database, if it is not in it yet */ #born = '';
  readonly #tab: string = crypto.randomUUID();
  /** the designs as this tab last read or saved them */ #base = '';
  /** the project has a name here that the database does not know yet */ #nameOwed = false;
  /** last words of an earlier visit that are on the page and not saved yet */ #takenUp: string[] = [];
  readonly #session: Session;
  readonly #store: ProjectStore;
  readonly #tabs: Tabs;
  readonly #autosave: Autosave;
  readonly #lasting: Lasting;
  #wordsTimer: ReturnType<typeof setTimeout> | undefined;
  readonly #touch = (event: Event): void => {
    this.#autosave.touch();
    if (event.type === 'design') this.#wordsTimer ??= setTimeout(() => this.#leaveWords(), WORDS_MS);
  };

  /**
   * @param channel  name that tabs meet under; tests give their own
   * @param lasting  asked once there is an edit to keep
   */
  constructor(session: Session, store: ProjectStore, channel?: string, lasting = new Lasting()) {
    super();
    this.#lasting = lasting;
    this.#session = session;
    this.#store = store;
    this.#tabs = new Tabs((notice) => void this.#heard(notice), channel);
    this.#autosave = new Autosave(
      () => this.#save(),
      () => this.dispatchEvent(new Event('saving')),
    );
    for (const what of TOUCHING) session.addEventListener(what, this.#touch);
  }

  get project(): OpenProject {
    return this.#project;
  }
  /** Whether leaving now would lose something: it is not saved, and saving does not work. */
  get atRisk(): boolean {
    return this.#autosave.unsaved && (this.saving.kind === 'failed' || this.saving.kind === 'conflict');
  }
  get saving(): SavingState {
    const { state } = this.#autosave;
    return state.kind === 'saved' && this.#lasting.clearable ? CLEARABLE : state;
  }

  /** Opens the project that was open last, or the one changed last. @returns false when there is none, or nothing can be read */
  async openLast(): Promise<Opened> {
    const unknown = await this.#openUnknown();
    if (unknown !== null) return unknown;
    try {
      const last = await this.#store.setting('last');
      const entries = (await this.#store.list()).filter((entry) => entry.binned === null);
      for (const { id } of [...entries.filter((entry) => entry.id === last), ...entries.filter((entry) => entry.id !== last)]) {
        const opened = await this.open(id).catch((error: unknown): Opened => ({ ok: false, why: storageFailure(error).sentence }));
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
    await this.#begin(name, design, [], crypto.randomUUID());
    return { ok: true, recovered: false };
  }

  /** Gives the open project another name. Never rejects: a name that cannot be written now is owed like any other change. */
  async rename(name: string): Promise<void> {
    const wish = name.trim();
    if (wish === '') return;
    const opened = this.#opened;
    this.#project = { ...this.#project, name: wish };
    this.dispatchEvent(new Event('project'));
    const { id } = this.#project;
    if (id === null) return;
    this.#nameOwed = true;
    try {
      await this.#store.rename(id, wish);
      if (opened === this.#opened && this.#project.name === wish) this.#nameOwed = false;
    } catch {
      this.#autosave.touch();
    }
  }

  /** After a conflict: what is on this page goes on as a project of its own. */
  async keepMineAsCopy(): Promise<void> {
    const { name } = this.#project;
    const content = this.#content();
    const record = await this.#store.create(`${name} (copy)`, content);
    this.#opened++;
    this.#forget();
    this.#project = { id: record.id, name: record.name, revision: record.revision };
    this.#base = workOf(content);
    this.#nameOwed = false;
    this.#dropTakenUp();
    // What changed while the copy was written is not in it.
    const unsaved = workOf(this.#content()) !== workOf(content);
    this.#autosave.reset();
    if (unsaved) this.#autosave.touch();
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
    // A page that is being closed may not live to see the transaction's end.
    this.#leaveWords();
    await this.#autosave.flush();
  }

  /** Saves what is unsaved and lets go of the session. */
  async close(): Promise<void> {
    for (const what of TOUCHING) this.#session.removeEventListener(what, this.#touch);
    await this.flush();
    clearTimeout(this.#wordsTimer);
    this.#tabs.close();
    this.#autosave.reset();
  }

  /** A new project takes the place of the one on the page, and is written under an id of its own. `places` are the last words that it is made of. */
  async #begin(name: string, design: Design, places: string[], born: string): Promise<void> {
    this.#opened++;
    this.#born = born;
    this.#takenUp = places;
    this.#nameOwed = false;
    this.#project = { id: null, name, revision: 0 };
    this.#session.open(design);
    this.#autosave.reset();
    this.#autosave.touch();
    await this.#autosave.flush();
    this.dispatchEvent(new Event('project'));
  }

  /** Projects of an earlier visit that may never have come into the database: the first is opened, others are added. @returns null when there is none */
  async #openUnknown(): Promise<Opened | null> {
    let opened: Opened | null = null;
    for (const { place, words } of hearLastWords(NOWHERE)) {
      const reading = readDesign(words.designText);
      if (!reading.ok) continue;
      const { born = crypto.randomUUID() } = words;
      // The tab died after the database had the project and before it heard so: what it had to say is about that one.
      if (await this.#isKept(born)) {
        if (leaveLastWords({ ...words, id: born, revision: 1 }, born)) forgetLastWords(place);
        if (opened === null) opened = await this.open(born).then((outcome) => (outcome.ok ? outcome : null));
        continue;
      }
      const name = reading.design.title.trim() || 'untitled';
      if (opened !== null) await this.#rescue({ name, view: {} }, place, { ...words, born });
      else {
        await this.#begin(name, reading.design, [place], born);
        opened = { ok: true, recovered: true };
      }
    }
    return opened;
  }

  async #isKept(id: string): Promise<boolean> {
    return this.#store.get(id).then((record) => record !== null, () => false);
  }

  #leaveWords(): void {
    clearTimeout(this.#wordsTimer);
    this.#wordsTimer = undefined;
    const { id, revision } = this.#project;
    if (!this.#autosave.unsaved) return;
    leaveLastWords({ id: id ?? NOWHERE, revision, designText: writeDesign(this.#session.design), variant: this.#session.variants.open, ...(id === null ? { born: this.#born } : {}) }, this.#tab);
  }

  async #take(record: ProjectRecord): Promise<Opened> {
    const reading = readDesign(record.designText);
    const variants = reading.ok ? readVariants(record.variants ?? LONE, reading.design) : { ok: false as const, designText: record.designText, complaint: reading.complaints[0] };
    if (!variants.ok || !reading.ok) {
      const { designText, complaint } = variants as Extract<typeof variants, { ok: false }>;
      const why = complaintLine(complaint);
      // It is whole, and the newer page will read it again.
      if (isNewer(designText)) return { ok: false, why: `"${record.name}" ${why.replace(/^format:? /, '')}. Reload the page to get its newest version; the project stays as it is.` };
      const aside = await this.#store.setAside(record.id, why).then(
        () => 'It has been set aside as it is.',
        () => 'It stays where it is.',
      );
      return { ok: false, why: `"${record.name}" can no longer be read (${why}). ${aside}` };
    }
    this.#opened++;
    this.#nameOwed = false;
    this.#takenUp = [];
    this.#project = { id: record.id, name: record.name, revision: record.revision };
    this.#base = workOf(record);
    this.#session.open(reading.design, { history: record.history, view: record.view, variants: variants.all });
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
    let from: string | null = null;
    for (const { place, tab, words } of hearLastWords(record.id)) {
      const reading = readDesign(words.designText);
      if (!reading.ok || words.designText === textOfVariant(record, words.variant)) forgetLastWords(place);
      else if (words.revision === record.revision && (from ?? tab) === tab) {
        // One tab may have left words of several variants.
        from = tab;
        this.#toVariant(words.variant);
        recovered = this.#session.edit(reading.design, 'changes just before the page was closed') || recovered;
        // They stay where they are until the design that holds them now is saved.
        this.#takenUp.push(place);
      } else await this.#rescue(record, place, words);
    }
    return recovered;
  }

  /** The variant that unsaved changes belong to comes onto the page; one that was never saved is made again. */
  #toVariant(id: string | undefined): void {
    const all = this.#session.variants;
    if (id === undefined || id === all.open) return;
    const known = all.list.some((variant) => variant.id === id);
    this.#session.changeVariants(known ? openVariant(takeBackVariant(all, id), id) : addVariant(all, 'unsaved changes', id));
  }

  /** Makes a project of its own of what a losing tab left; where that cannot be written, it stays for the next visit. */
  async #rescue({ name, view }: Pick<ProjectRecord, 'name' | 'view'>, place: string, words: LastWords): Promise<void> {
    // Its id is noted first: a visit that dies before it has forgotten the words leads to no second copy.
    const { born = crypto.randomUUID(), designText } = words;
    try {
      rewriteLastWords(place, { ...words, born });
      if (!(await this.#isKept(born))) await this.#store.create(`${name} (unsaved changes)`, { designText, history: { past: [], future: [] }, view }, {}, born);
      forgetLastWords(place);
    } catch {
      // Told by the next save, which fails for the same reason.
    }
  }

  #dropWords(): void {
    clearTimeout(this.#wordsTimer);
    this.#wordsTimer = undefined;
    for (const id of [this.#project.id ?? NOWHERE, NOWHERE]) dropLastWords(id, this.#tab);
  }

  #dropTakenUp(): void {
    for (const place of this.#takenUp.splice(0)) forgetLastWords(place);
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
    this.#dropWords();
    this.#dropTakenUp();
  }

  #content(): Content {
    return { designText: writeDesign(this.#session.design), history: this.#session.historyRecord, view: this.#session.view, variants: keptVariants(this.#session.variants) };
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
      this.#base = workOf(content);
      // What changed while this was written is still owed.
      if (workOf(this.#content()) === workOf(content)) this.#dropWords();
      this.#dropTakenUp();
      this.#project = { ...this.#project, revision: outcome.revision };
      this.#tabs.tell({ kind: 'saved', id, revision: outcome.revision });
      if (this.#nameOwed) await this.#payName(id);
      if (this.#session.historyRecord.past.length > 0) void this.#lasting.ask().then((answered) => answered && this.dispatchEvent(new Event('saving')));
    }
    return outcome;
  }

  async #payName(id: string): Promise<void> {
    const { name } = this.#project;
    await this.#store.rename(id, name);
    if (this.#project.name === name) this.#nameOwed = false;
  }

  async #saveOnTop(id: string, content: Content): Promise<SaveOutcome> {
    const outcome = await this.#store.save(id, this.#project.revision, content);
    if (outcome.kind !== 'conflict' || outcome.other === null || ![this.#base, workOf(content)].includes(workOf(outcome.other))) return outcome;
    // The other tab only looked at the same design from elsewhere, or came to the same one: nobody's work is at stake.
    return this.#store.save(id, outcome.other.revision, content);
  }

  async #add(content: Content): Promise<SaveOutcome> {
    const opened = this.#opened;
    try {
      const record = await this.#store.create(this.#project.name, content, {}, this.#born);
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
    if (other !== null && workOf(other) === this.#base) this.#project = { ...this.#project, revision: other.revision };
    else this.#autosave.meet(other);
  }

  async #remember(id: string): Promise<void> {
    // Which project was open last is a convenience: its loss is no reason to stop.
    await this.#store.setSetting('last', id).catch(() => {});
  }
}
