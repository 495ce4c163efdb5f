import { setTitle } from '../../src/state/commands/index.ts';
import type { ProjectAct, VariantAct } from '../shared/events.ts';
import { fetchStarters } from './choices.ts';
import type { Page } from './page.ts';
import type { DeskOutcome } from './project-desk.ts';
import { actOnVariants } from './variant-acts.ts';

/** Carries out what a person asks of projects and variants, says what it came to, and asks first where something unsaved would be lost. */
export class ProjectWishes {
  /** what the last act in the list of projects came to */ remark = '';
  /** what was asked for and waits, because something is not saved */ #regardless: (() => Promise<DeskOutcome>) | null = null;
  readonly #page: Page;

  constructor(page: Page) {
    this.#page = page;
  }

  readonly act = async (act: ProjectAct): Promise<void> => {
    await this.settle(this.#page.desk.act(act));
    this.#page.requestUpdate();
  };

  readonly rename = (name: string): void => {
    const { keeper, session } = this.#page;
    void keeper.rename(name);
    session.edit(setTitle(session.design, name.trim()), 'title');
  };

  readonly variant = (act: VariantAct): void => {
    const { keeper, session } = this.#page;
    const said = actOnVariants(session, act);
    if (said === null) return;
    this.#page.say(said);
    // Another one is on the page: what was typed into the one that was left is safe before anything else happens.
    void keeper.flush();
  };

  readonly starter = async (id: string): Promise<void> => {
    const starter = (await fetchStarters()).find((one) => one.id === id);
    if (starter !== undefined) await this.settle(this.#page.desk.open(starter.title, starter.design));
  };

  readonly settle = async (work: Promise<DeskOutcome>): Promise<void> => {
    const outcome = await work;
    this.#regardless = outcome.regardless ?? null;
    if (this.#regardless !== null) return this.#page.unsavedQuestion.show();
    if (outcome.opened) this.#page.element('hm-projects').close();
    this.remark = outcome.said;
    this.#page.say(outcome.said, outcome.urgent);
    this.#page.requestUpdate();
  };

  /** The answers to the question whether to lose what could not be saved. */
  readonly unsaved = {
    closed: (): void => void (this.#regardless = null),
    save: (): void => void this.saveDesign(),
    lose: (): void => {
      const regardless = this.#regardless;
      this.#page.unsavedQuestion.close();
      if (regardless !== null) void this.settle(regardless());
    },
  };

  /** Writes the design to a file and says where it went. */
  async saveDesign(): Promise<void> {
    this.#page.say(await this.#page.element('hm-leave').saveDesign());
  }
}
