import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { keyed } from 'lit/directives/keyed.js';
import type { Design } from '../../src/design/types.ts';
import type { DepthAxis } from '../../src/drawing/depth-axis.ts';
import { blankDesign } from '../../src/state/blank-design.ts';
import { offlineCopy } from '../../src/offline/start.ts';
import { setTitle } from '../../src/state/commands/index.ts';
import { Session } from '../../src/state/session.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import type { View } from '../../src/state/view.ts';
import { SolverClient } from '../../src/workers/client.ts';
import { JobClient } from '../../src/workers/job-client.ts';
import { startJobWorker } from '../../src/workers/job-start.ts';
import { startSolveWorker } from '../../src/workers/start-worker.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import type { HmLeave } from '../hm-leave/hm-leave.ts';
import type { HmPlate, PlateAxes } from '../hm-plate/hm-plate.ts';
import type { PlateView } from '../hm-plate/plate-view.ts';
import type { HalfmarkEvents, PageAct } from '../shared/events.ts';
import { WorkingsController } from '../hm-workings/workings-controller.ts';
import { look } from '../shared/look.ts';
import { isDark, isTheme, readTheme, setTheme, type Theme } from '../shared/theme.ts';
import '../hm-assumptions/hm-assumptions.ts';
import '../hm-conditions/hm-conditions.ts';
import '../hm-desk/hm-desk.ts';
import '../hm-messages/hm-messages.ts';
import '../hm-plate/hm-plate.ts';
import '../hm-rail/hm-rail.ts';
import '../hm-strip/hm-strip.ts';
import '../hm-variables/hm-variables.ts';
import { choicesFor, fetchStarters, starterCards, type Choices } from './choices.ts';
import { pageDialogs, type PageDialogs } from './dialogs.ts';
import { FrameController } from './frame-controller.ts';
import { styles } from './hm-app.styles.ts';
import { IncomingController } from './incoming.ts';
import { JudgingController } from './judging-controller.ts';
import { pageKey } from './keys.ts';
import { OfflineController } from './offline-controller.ts';
import { STORE_WORDS } from './store-words.ts';
import { OverlayController } from './overlay-controller.ts';
import { ProjectDesk, type DeskOutcome } from './project-desk.ts';
import { RemarkController } from './remark-controller.ts';
import { StaleController } from './stale-controller.ts';
import { actOnVariants } from './variant-acts.ts';

type On<K extends keyof HalfmarkEvents> = CustomEvent<HalfmarkEvents[K]>;
/** Showing, or about to show: methods that every dialog of the page has. */
type Showing = HTMLElement & { show(): void };


/**
 * The page. It alone knows the open session, the store of projects and the solver; every other element gets values and tells wishes.
 *
 * @attr database  name of the browser's database; tests give their own
 */
export class HmApp extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    database: {},
    ready: { state: true },
    axes: { state: true },
    choices: { state: true },
    deskRemark: { state: true },
    theme: { state: true },
    regardless: { state: true },
  };

  declare database: string;
  /** a project is on the page */ declare private ready: boolean;
  /** of the plate, for the rail and the strip */ declare private axes: PlateAxes | null;
  declare private choices: Choices;
  /** what the last act in the list of projects came to */ declare private deskRemark: string;
  declare private theme: Theme;
  /** what was asked for and waits, because something is not saved */ declare private regardless: (() => Promise<DeskOutcome>) | null;

  private readonly solver = new SolverClient(startSolveWorker);
  private readonly session = new Session(blankDesign(''), (design) => this.solver.solve(design));
  private store!: ProjectStore;
  private keeper!: Keeper;
  private desk!: ProjectDesk;
  private readonly remarks = new RemarkController(this);
  private readonly staleness = new StaleController(this);
  private readonly workings = new WorkingsController(this, (text) => this.say(text, true));
  private readonly jobs = new JobClient(startJobWorker);
  private readonly judging = new JudgingController(this, this.jobs.run);
  private readonly overlay = new OverlayController(this, startSolveWorker);
  /** what the plate and the messages are handed, new only when it changed: they are not drawn anew at every move of the pointer */
  private handed: { view: View; style: 'light' | 'dark'; plateView: PlateView; design: Design; names: string[] } | null = null;
  private customShown: unknown = this;
  private failed = false;
  private readonly frames = new FrameController(this);
  private readonly incoming = new IncomingController(this, (text) => void this.settle(this.desk.take(text)), (text) => this.say(text, true));
  private readonly darkness = matchMedia('(prefers-color-scheme: dark)');
  private readonly redraw = (): void => this.requestUpdate();
  private readonly hide = (event: Event): void => {
    if (this.ready && (event.type === 'pagehide' || document.visibilityState === 'hidden')) void this.keeper.flush();
  };
  /** The browser asks in its own words whether to leave. */
  private readonly warn = (event: Event): void => {
    if (this.ready && this.keeper.atRisk) event.preventDefault();
  };

  constructor() {
    super();
    this.database = 'halfmark';
    this.ready = false;
    this.axes = null;
    this.choices = { materials: [], dopants: [], metals: [] };
    this.deskRemark = '';
    this.theme = readTheme();
    this.regardless = null;
    new OfflineController(this, offlineCopy, (text) => this.say(text));
  }

  override connectedCallback(): void {
    super.connectedCallback();
    setTheme(this.theme);
    this.store = new ProjectStore((moment) => this.say(STORE_WORDS[moment], true), this.database);
    this.keeper = new Keeper(this.session, this.store, this.database);
    this.desk = new ProjectDesk(this.store, this.keeper);
    for (const what of ['design', 'view', 'moment', 'variants']) this.session.addEventListener(what, this.redraw);
    this.session.addEventListener('findings', () => this.found());
    for (const what of ['project', 'saving']) this.keeper.addEventListener(what, this.redraw);
    this.darkness.addEventListener('change', this.redraw);
    document.addEventListener('visibilitychange', this.hide);
    addEventListener('pagehide', this.hide);
    addEventListener('beforeunload', this.warn);
    // Before any element sees the key: fields keep keys to themselves.
    addEventListener('keydown', this.key, { capture: true });
    void this.start();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    this.darkness.removeEventListener('change', this.redraw);
    document.removeEventListener('visibilitychange', this.hide);
    removeEventListener('pagehide', this.hide);
    removeEventListener('beforeunload', this.warn);
    removeEventListener('keydown', this.key, { capture: true });
    this.solver.close();
    this.jobs.close();
    const { keeper, store } = this;
    void keeper.close().finally(() => store.close());
  }

  private async start(): Promise<void> {
    const opened = await this.keeper.openLast();
    if (opened.ok) {
      if (opened.recovered) this.say('Changes that the last visit had no time to save were taken up; undo takes them back.');
    } else {
      // An empty page is no welcome; where the starters cannot be fetched, one layer is better than nothing.
      const [first] = await fetchStarters().catch(() => [{ title: 'untitled', design: blankDesign('untitled') }]);
      await this.keeper.create(first.title, first.design);
    }
    this.ready = true;
    await this.incoming.takeLink();
  }

  protected override willUpdate(_: PropertyValues): void {
    const { design, view } = this.session;
    this.overlay.follow(this.session);
    const style = isDark(this.theme) ? 'dark' : 'light';
    const { handed } = this;
    if (handed?.view !== view || handed.style !== style || handed.design !== design) {
      const plateView = handed?.view === view && handed.style === style ? handed.plateView : ({ ...view, style } as PlateView);
      this.handed = { view, style, plateView, design, names: design.layers.map((layer) => layer.name) };
    }
    const { custom } = design;
    if (!this.ready || custom === this.customShown) return;
    this.customShown = custom;
    choicesFor(custom).then(
      (choices) => (this.choices = choices),
      () => this.say('The lists of materials, dopants and metals could not be fetched: reload the page to have them in the menus.', true),
    );
  }

  protected override updated(): void {
    if (this.ready) document.title = `${this.keeper.project.name} | Halfmark`;
    // One energy axis: the rail's picture begins where the plate's does.
    const plate = this.renderRoot.querySelector<HmPlate>('hm-plate');
    const rail = this.renderRoot.querySelector<HTMLElement>('hm-rail');
    const picture = plate?.renderRoot?.querySelector('svg');
    if (!plate || !rail || !picture) return;
    const beside = Math.abs(plate.getBoundingClientRect().top - rail.parentElement!.getBoundingClientRect().top) < 1;
    rail.style.marginTop = beside ? `${picture.getBoundingClientRect().top - plate.getBoundingClientRect().top}px` : '0';
  }

  // What the page hears.

  private found(): void {
    const { findings } = this.session;
    const { status, refusal, complaints } = findings;
    this.staleness.follow(findings);
    this.judging.follow(this.session);
    const fails = refusal !== null || complaints.length > 0;
    // The reason itself is spoken by the messages; that it is over has no other voice.
    if (status === 'complete' && this.failed) this.say('Solved.');
    if (status !== 'pending') this.failed = fails;
    this.requestUpdate();
  }

  private say(text: string, urgent = false): void {
    this.remarks.say(text, urgent);
  }

  private show(name: string): void {
    this.renderRoot.querySelector<Showing>(name)!.show();
  }

  private async settle(work: Promise<DeskOutcome>): Promise<void> {
    const outcome = await work;
    this.regardless = outcome.regardless ?? null;
    if (this.regardless !== null) return void this.renderRoot.querySelector<HmDialog>('#unsaved')!.show();
    if (outcome.opened) {
      const projects = this.renderRoot.querySelector('hm-projects');
      projects?.close();
    }
    this.deskRemark = outcome.said;
    this.say(outcome.said, outcome.urgent);
  }

  private readonly key = (event: KeyboardEvent): void => {
    const asked = pageKey(event);
    if (asked === null || !this.ready) return;
    event.preventDefault();
    event.stopPropagation();
    if (asked === 'save-design') void this.renderRoot.querySelector<HmLeave>('hm-leave')!.saveDesign().then((said) => this.say(said));
    else this.act(asked);
  };

  private act(act: PageAct): void {
    switch (act) {
      case 'undo':
      case 'redo': {
        const label = this.session[act]();
        return this.say(label === null ? `Nothing to ${act}.` : `${act === 'undo' ? 'Taken back' : 'Done again'}: ${label}.`);
      }
      case 'projects':
        this.deskRemark = '';
        void this.desk.look().then(() => this.requestUpdate(), () => this.say('The list of projects cannot be read.', true));
        return this.show('hm-projects');
      case 'starters':
        fetchStarters().then(
          (starters) => (this.renderRoot.querySelector('hm-starters')!.starters = starterCards(starters)),
          () => this.say('The worked designs could not be fetched.', true),
        );
        return this.show('hm-starters');
      case 'leave':
        return this.show('hm-leave');
      case 'about':
        return this.show('hm-about');
      case 'sheet':
        // The dialogs are modal: the one that it was asked from makes room.
        this.renderRoot.querySelector<HmLeave>('hm-leave')!.close();
        return void import('../hm-sheet/hm-sheet.ts').then(() => this.show('hm-sheet'), () => this.say('The review sheet could not be fetched.', true));
      case 'open-file':
        return this.incoming.pick();
      case 'cancel':
        return this.solver.cancel();
      case 'again':
        return this.session.askAgain();
      case 'judge-stop':
        return this.judging.stop();
      case 'judge-again':
        return void this.judging.judge(this.session.design);
      case 'keep-mine':
        return void this.keeper.keepMineAsCopy().then(() => this.say(`Kept as ${this.keeper.project.name}.`), () => this.say('The copy could not be saved: take the design away as a file.', true));
      case 'take-other':
        return void this.keeper.takeTheOther().then((opened) => this.say(opened.ok ? 'This is what the other tab saved.' : opened.why, !opened.ok));
    }
  }

  /** What the dialogs show. */
  private get dialogs(): PageDialogs {
    const { session, keeper, desk, judging } = this;
    const { verdicts } = judging;
    return {
      design: session.design,
      result: session.findings.result,
      stale: session.findings.stale,
      plateLook: session.view as PlateView,
      requirements: verdicts.status === 'complete' && !verdicts.stale ? verdicts.rows : null,
      entries: desk?.entries ?? [],
      damaged: desk?.damaged ?? [],
      openId: keeper?.project.id ?? null,
      remark: this.deskRemark,
      unsaved: { closed: () => (this.regardless = null), save: () => void this.renderRoot.querySelector<HmLeave>('hm-leave')!.saveDesign().then((said) => this.say(said)), lose: () => this.letGo() },
    };
  }

  private edit({ detail }: On<'hm-edit'>): void {
    this.session.edit(detail.next, detail.label, detail.join);
  }

  private view({ detail }: On<'hm-view'>): void {
    const { theme, workings, ...change } = detail.change;
    void this.workings.ask(workings);
    if (isTheme(theme)) {
      this.theme = theme;
      setTheme(theme);
    }
    if (Object.keys(change).length > 0) this.session.changeView(change);
  }

  private rename({ detail }: On<'hm-rename'>): void {
    void this.keeper.rename(detail.name);
    this.session.edit(setTitle(this.session.design, detail.name.trim()), 'title');
  }

  private variant({ detail }: On<'hm-variant'>): void {
    const said = actOnVariants(this.session, detail);
    if (said === null) return;
    this.say(said);
    // Another one is on the page: what was typed into the one that was left is safe before anything else happens.
    void this.keeper.flush();
  }

  private async starter({ detail }: On<'hm-starter'>): Promise<void> {
    const starter = (await fetchStarters()).find(({ id }) => id === detail.id);
    if (starter !== undefined) await this.settle(this.desk.open(starter.title, starter.design));
  }

  private async project({ detail }: On<'hm-project'>): Promise<void> {
    await this.settle(this.desk.act(detail));
    this.requestUpdate();
  }

  private letGo(): void {
    const { regardless } = this;
    this.renderRoot.querySelector<HmDialog>('#unsaved')!.close();
    if (regardless !== null) void this.settle(regardless());
  }

  override render(): TemplateResult {
    const { session, keeper } = this;
    return html`<div
      class="page"
      @hm-edit=${this.edit}
      @hm-view=${this.view}
      @hm-act=${({ detail }: On<'hm-act'>) => this.act(detail.act)}
      @hm-depth=${({ detail }: On<'hm-depth'>) => session.changeMoment(detail)}
      @hm-choose=${({ detail }: On<'hm-choose'>) => session.changeMoment({ chosen: detail })}
      @hm-say=${({ detail }: On<'hm-say'>) => this.say(detail.text, detail.urgent)}
      @hm-rename=${this.rename}
      @hm-starter=${this.starter}
      @hm-variant=${this.variant}
      @hm-frame=${({ detail }: On<'hm-frame'>) => this.frames.show(detail, this.keeper.project.id)}
      @hm-project=${this.project}
    >
      <header>
        <hm-conditions
          .project=${keeper?.project.name ?? ''}
          .design=${this.ready ? session.design : null}
          .complaints=${session.findings.complaints}
          .saving=${keeper?.saving ?? { kind: 'saved' }}
          .undoLabel=${session.undoLabel}
          .redoLabel=${session.redoLabel}
          .theme=${this.theme}
        ></hm-conditions>
      </header>
      <hm-messages .findings=${session.findings} .saving=${keeper?.saving ?? { kind: 'saved' }} .remark=${this.remarks.remark} .layers=${this.handed?.names ?? []}></hm-messages>
      ${this.ready ? this.renderWork() : html`<main><p role="status">Opening</p></main>`} ${pageDialogs(this.dialogs)} ${this.workings.render(session.design, session.findings.result, session.findings.stale)}
      ${this.incoming.over ? html`<p class="drop">Let go to open the file</p>` : nothing}
    </div>`;
  }

  private renderWork(): TemplateResult {
    const { session, axes, choices } = this;
    const { result } = session.findings;
    const frame = this.frames.of(this.keeper.project.id);
    const { chosen, depth_nm } = session.moment;
    const { style, plateView } = this.handed!;
    return html`<main>
      <div class="diagram">
        ${frame ? html`<p class="frame" role="status">The picture is a ${frame.words} of the film; close the film to see the design's own.</p>` : nothing}
        <hm-plate
          .result=${frame?.result ?? result}
          .view=${plateView}
          .variants=${this.overlay.over}
          .stale=${this.staleness.dim}
          .depth_nm=${depth_nm}
          @plate-drawn=${({ detail }: CustomEvent<PlateAxes>) => (this.axes = detail)}
        ></hm-plate>
      </div>
      <div class="beside"><hm-rail .result=${frame?.result ?? result} .energy=${axes?.energy ?? null} .height=${axes?.height ?? 400} .depth_nm=${depth_nm} .styleName=${style} .stale=${this.staleness.dim}></hm-rail></div>
      <div class="under">
        <h2 class="spoken">Layer stack</h2>
        <hm-strip
          .design=${session.design}
          .result=${result}
          .axis=${(axes?.depth ?? null) as DepthAxis | null}
          .chosen=${chosen}
          .complaints=${session.findings.complaints}
          .materials=${choices.materials}
          .dopants=${choices.dopants}
          .metals=${choices.metals}
        ></hm-strip>
      </div>
      <div class="givens">
        <hm-variables .design=${session.design} .complaints=${session.findings.complaints}></hm-variables>
        <hm-assumptions .design=${session.design}></hm-assumptions>
      </div>
      <div class="figures">
        <h2 class="spoken">Figures, requirements, sizing</h2>
        ${keyed(
          this.keeper.project.id,
          html`<hm-desk
            .design=${session.design}
            .complaints=${session.findings.complaints}
            .result=${result}
            .stale=${this.staleness.dim}
            .view=${session.view}
            .chosen=${chosen}
            .verdicts=${this.judging.verdicts}
            .variants=${this.overlay.shown}
            .against=${this.overlay.against}
            .run=${this.jobs.run}
            .styleName=${style}
          ></hm-desk>`,
        )}
      </div>
    </main>`;
  }
}

customElements.define('hm-app', HmApp);

declare global {
  interface HTMLElementTagNameMap {
    'hm-app': HmApp;
  }
}
