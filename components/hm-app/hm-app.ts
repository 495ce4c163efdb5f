import { LitElement, html, nothing, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import { blankDesign } from '../../src/state/blank-design.ts';
import { offlineCopy } from '../../src/offline/start.ts';
import { Session } from '../../src/state/session.ts';
import { Keeper } from '../../src/storage/keeper.ts';
import { ProjectStore } from '../../src/storage/project-store.ts';
import type { View } from '../../src/state/view.ts';
import { SolverClient } from '../../src/workers/client.ts';
import { JobClient } from '../../src/workers/job-client.ts';
import { startJobWorker } from '../../src/workers/job-start.ts';
import { startSolveWorker } from '../../src/workers/start-worker.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import type { PlateAxes } from '../hm-plate/hm-plate.ts';
import type { PlateView } from '../hm-plate/plate-view.ts';
import { WorkingsController } from '../hm-workings/workings-controller.ts';
import type { HalfmarkEvents } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { OpenedFile } from '../shared/opened-file.ts';
import { isDark, isTheme, readTheme, setTheme, type Theme } from '../shared/theme.ts';
import '../hm-conditions/hm-conditions.ts';
import '../hm-messages/hm-messages.ts';
import { fetchStarters } from './choices.ts';
import { ChoicesController } from './choices-controller.ts';
import { pageDialogs, type PageDialogs } from './dialogs.ts';
import { FrameController } from './frame-controller.ts';
import { styles } from './hm-app.styles.ts';
import { IncomingController, type Incoming } from './incoming.ts';
import { JudgingController } from './judging-controller.ts';
import { pageKey } from './keys.ts';
import { OfflineController } from './offline-controller.ts';
import { OverlayController } from './overlay-controller.ts';
import type { Page } from './page.ts';
import { actOnPage } from './page-acts.ts';
import { ProjectDesk } from './project-desk.ts';
import { ProjectWishes } from './project-wishes.ts';
import { RemarkController } from './remark-controller.ts';
import { answerShelfWishes } from './shelf-wishes.ts';
import { StaleController } from './stale-controller.ts';
import { STORE_WORDS } from './store-words.ts';
import { WindowController } from './window-controller.ts';
import { workArea } from './work-area.ts';

type On<K extends keyof HalfmarkEvents> = CustomEvent<HalfmarkEvents[K]>;

/**
 * The page. It alone knows the open session, the store of projects and the solver; every other element gets values and tells wishes.
 *
 * @attr database  name of the browser's database; tests give their own
 */
export class HmApp extends LitElement implements Page {
  static override styles = [look, styles];
  static override properties = {
    database: {},
    ready: { state: true },
    axes: { state: true },
    theme: { state: true },
  };

  declare database: string;
  /** a project is on the page */ declare private ready: boolean;
  /** of the plate, for the rail and the strip */ declare private axes: PlateAxes | null;
  declare private theme: Theme;

  readonly solver = new SolverClient(startSolveWorker);
  readonly session = new Session(blankDesign(''), (design) => this.solver.solve(design));
  keeper!: Keeper;
  desk!: ProjectDesk;
  private store!: ProjectStore;
  private readonly jobs = new JobClient(startJobWorker);
  readonly judging = new JudgingController(this, this.jobs.run);
  private readonly wishes = new ProjectWishes(this);
  readonly incoming = new IncomingController(this, (incoming) => void this.take(incoming), (text) => this.say(text, true));
  /** files that projects were opened from since the page is open */ private readonly files = new Map<string, OpenedFile>();
  private readonly remarks = new RemarkController(this);
  private readonly staleness = new StaleController(this);
  private readonly workings = new WorkingsController(this, (text) => this.say(text, true));
  private readonly overlay = new OverlayController(this, startSolveWorker);
  private readonly frames = new FrameController(this);
  private readonly menus = new ChoicesController(this, () => this.say('The lists of materials, dopants and metals could not be fetched: reload the page to have them in the menus.', true));
  /** what the plate and the messages are handed, new only when it changed: they are not drawn anew at every move of the pointer */
  private handed: { view: View; style: 'light' | 'dark'; plateView: PlateView; design: Design; names: string[] } | null = null;
  private failed = false;
  private readonly redraw = (): void => this.requestUpdate();

  constructor() {
    super();
    this.database = 'halfmark';
    this.ready = false;
    this.axes = null;
    this.theme = readTheme();
    new OfflineController(this, offlineCopy, (text) => this.say(text));
    answerShelfWishes(this, () => this.store, (text) => this.say(text, true));
    new WindowController(this, {
      key: (event) => this.key(event),
      hidden: () => void (this.ready && this.keeper.flush()),
      atRisk: () => this.ready && this.keeper.atRisk,
    });
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
    void this.start();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
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

  protected override willUpdate(): void {
    const { design, view } = this.session;
    this.overlay.follow(this.session);
    const style = isDark(this.theme) ? 'dark' : 'light';
    const { handed } = this;
    if (handed?.view !== view || handed.style !== style || handed.design !== design) {
      const plateView = handed?.view === view && handed.style === style ? handed.plateView : ({ ...view, style } as PlateView);
      this.handed = { view, style, plateView, design, names: design.layers.map((layer) => layer.name) };
    }
    if (this.ready) this.menus.follow(design);
  }

  protected override updated(): void {
    if (this.ready) document.title = `${this.keeper.project.name} | Halfmark`;
    // One energy axis: the rail's picture begins where the plate's does.
    const plate = this.renderRoot.querySelector('hm-plate');
    const rail = this.renderRoot.querySelector('hm-rail');
    const picture = plate?.renderRoot?.querySelector('svg');
    if (!plate || !rail || !picture) return;
    const beside = Math.abs(plate.getBoundingClientRect().top - rail.parentElement!.getBoundingClientRect().top) < 1;
    rail.style.marginTop = beside ? `${picture.getBoundingClientRect().top - plate.getBoundingClientRect().top}px` : '0';
  }

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

  private key(event: KeyboardEvent): void {
    const asked = pageKey(event);
    if (asked === null || !this.ready) return;
    event.preventDefault();
    event.stopPropagation();
    if (asked === 'save-design') void this.wishes.saveDesign();
    else actOnPage(this, this.wishes, asked);
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

  readonly say = (text: string, urgent = false): void => this.remarks.say(text, urgent);

  element<K extends keyof HTMLElementTagNameMap>(name: K): HTMLElementTagNameMap[K] {
    return this.renderRoot.querySelector(name)!;
  }

  get unsavedQuestion(): HmDialog {
    return this.renderRoot.querySelector<HmDialog>('#unsaved')!;
  }

  private async take(incoming: Incoming): Promise<void> {
    const before = this.keeper.project.id;
    await this.wishes.settle(this.desk.take(incoming));
    const { id } = this.keeper.project;
    if (incoming.file === undefined || id === null || id === before) return;
    this.files.set(id, incoming.file);
    this.requestUpdate();
  }

  /** What the dialogs show. */
  private get dialogs(): PageDialogs {
    const { session, keeper, desk, judging, wishes } = this;
    const { verdicts } = judging;
    return {
      design: session.design,
      result: session.findings.result,
      stale: session.findings.stale,
      plateLook: session.view as PlateView,
      requirements: verdicts.status === 'complete' && !verdicts.stale ? verdicts.rows : null,
      variants: session.variants,
      run: this.jobs.run,
      file: this.files.get(keeper?.project.id ?? '') ?? null,
      entries: desk?.entries ?? [],
      damaged: desk?.damaged ?? [],
      openId: keeper?.project.id ?? null,
      remark: wishes.remark,
      unsaved: wishes.unsaved,
    };
  }

  override render(): TemplateResult {
    const { session, keeper, wishes } = this;
    const { complaints, result, stale } = session.findings;
    const saving = keeper?.saving ?? { kind: 'saved' };
    return html`<div
      class="page"
      @hm-edit=${({ detail }: On<'hm-edit'>) => session.edit(detail.next, detail.label, detail.join)}
      @hm-view=${this.view}
      @hm-act=${({ detail }: On<'hm-act'>) => actOnPage(this, wishes, detail.act)}
      @hm-depth=${({ detail }: On<'hm-depth'>) => session.changeMoment(detail)}
      @hm-choose=${({ detail }: On<'hm-choose'>) => session.changeMoment({ chosen: detail })}
      @hm-say=${({ detail }: On<'hm-say'>) => this.say(detail.text, detail.urgent)}
      @hm-rename=${({ detail }: On<'hm-rename'>) => wishes.rename(detail.name)}
      @hm-starter=${({ detail }: On<'hm-starter'>) => wishes.starter(detail.id)}
      @hm-variant=${({ detail }: On<'hm-variant'>) => wishes.variant(detail)}
      @hm-frame=${({ detail }: On<'hm-frame'>) => this.frames.show(detail, keeper.project.id)}
      @hm-project=${({ detail }: On<'hm-project'>) => wishes.act(detail)}
    >
      <header>
        <hm-conditions
          .project=${keeper?.project.name ?? ''}
          .design=${this.ready ? session.design : null}
          .complaints=${complaints}
          .saving=${saving}
          .undoLabel=${session.undoLabel}
          .redoLabel=${session.redoLabel}
          .theme=${this.theme}
        ></hm-conditions>
      </header>
      <hm-messages .findings=${session.findings} .saving=${saving} .remark=${this.remarks.remark} .layers=${this.handed?.names ?? []}></hm-messages>
      ${this.ready ? this.renderWork() : html`<main><p role="status">Opening</p></main>`} ${pageDialogs(this.dialogs)} ${this.workings.render(session.design, result, stale)}
      ${this.incoming.over ? html`<p class="drop">Let go to open the file</p>` : nothing}
    </div>`;
  }

  private renderWork(): TemplateResult {
    const { style, plateView } = this.handed!;
    const project = this.keeper.project.id;
    return workArea({
      session: this.session, project, plateView, style,
      axes: this.axes,
      stale: this.staleness.dim,
      frame: this.frames.of(project),
      choices: this.menus.choices,
      overlay: this.overlay,
      verdicts: this.judging.verdicts,
      run: this.jobs.run,
      plateDrawn: ({ detail }) => (this.axes = detail),
    });
  }
}

customElements.define('hm-app', HmApp);

declare global {
  interface HTMLElementTagNameMap {
    'hm-app': HmApp;
  }
}
