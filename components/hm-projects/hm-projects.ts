import { LitElement, html, nothing, type TemplateResult } from 'lit';
import { fileTooLarge } from '../../src/storage/backup-bounds.ts';
import type { ProjectEntry } from '../../src/storage/record.ts';
import type { Damaged } from '../../src/storage/project-store.ts';
import { tell, type ProjectAct } from '../shared/events.ts';
import { look } from '../shared/look.ts';
import type { HmDialog } from '../hm-dialog/hm-dialog.ts';
import '../hm-dialog/hm-dialog.ts';
import '../hm-field/hm-field.ts';
import { styles } from './hm-projects.styles.ts';

/**
 * The projects of this browser: open, rename, copy, put in the bin; the bin, and out of it; what could not be read, to be rescued as text; one backup file
 * of all, and back from it. `show()` opens it.
 *
 * @fires hm-project
 * @fires hm-say  a file that cannot be read
 */
export class HmProjects extends LitElement {
  static override styles = [look, styles];
  static override properties = {
    entries: { attribute: false },
    damaged: { attribute: false },
    openId: { attribute: false },
    remark: {},
    sure: { state: true },
  };

  declare entries: readonly ProjectEntry[];
  declare damaged: readonly Damaged[];
  /** of the project on the page */ declare openId: string | null;
  /** what the last act came to */ declare remark: string;
  /** the project whose deletion waits for a second press */ declare private sure: string | null;

  constructor() {
    super();
    this.entries = [];
    this.damaged = [];
    this.openId = null;
    this.remark = '';
    this.sure = null;
  }

  private get dialog(): HmDialog {
    return this.renderRoot.querySelector('hm-dialog')!;
  }

  show(): void {
    this.sure = null;
    void this.dialog.show();
  }

  close(): void {
    this.dialog.close();
  }

  private act(act: ProjectAct): void {
    this.sure = null;
    tell(this, 'hm-project', act);
  }

  private delete(id: string): void {
    if (this.sure === id) this.act({ act: 'delete', id });
    else this.sure = id;
  }

  private async restoreBackup(event: Event): Promise<void> {
    const input = event.target as HTMLInputElement;
    const file = input.files?.[0];
    input.value = '';
    if (file === undefined) return;
    const tooLarge = fileTooLarge(file);
    if (tooLarge !== null) return tell(this, 'hm-say', { text: tooLarge, urgent: true });
    try {
      this.act({ act: 'restore-backup', text: await file.text() });
    } catch (error) {
      tell(this, 'hm-say', { text: `The file could not be read (${error instanceof Error ? error.message : String(error)}).`, urgent: true });
    }
  }

  override render(): TemplateResult {
    const kept = this.entries.filter((entry) => entry.binned === null);
    const binned = this.entries.filter((entry) => entry.binned !== null);
    return html`<hm-dialog heading="Projects in this browser">
      <p class="remark" role="status">${this.remark}</p>
      <div class="bar">
        <button type="button" @click=${() => this.act({ act: 'new' })}>New project</button>
        <button type="button" @click=${() => this.act({ act: 'backup' })}>Back up all</button>
        <label class="button">Restore from a backup<input type="file" accept=".json,application/json" @change=${this.restoreBackup} /></label>
      </div>
      <ul>
        ${kept.map((entry) => this.renderKept(entry))}
      </ul>
      ${binned.length === 0 ? nothing : html`<h3>Bin</h3><ul>${binned.map((entry) => this.renderBinned(entry))}</ul>`}
      ${this.damaged.length === 0 ? nothing : this.renderDamaged()}
    </hm-dialog>`;
  }

  private renderKept(entry: ProjectEntry): TemplateResult {
    const isOpen = entry.id === this.openId;
    const { id, name } = entry;
    return html`<li class=${isOpen ? 'open' : ''} aria-current=${isOpen ? 'true' : nothing}>
      <hm-field label="Name" label-hidden .value=${name} @field-accept=${(e: CustomEvent<string>) => this.act({ act: 'rename', id, name: e.detail })}></hm-field>
      <span class="when">${isOpen ? 'on the page; ' : ''}changed ${when(entry.changed)}</span>
      <span class="row">
        <button type="button" ?disabled=${isOpen} @click=${() => this.act({ act: 'open', id })}>Open<span class="spoken"> ${name}</span></button>
        <button type="button" @click=${() => this.act({ act: 'copy', id })}>Copy<span class="spoken"> ${name}</span></button>
        <button type="button" @click=${() => this.act({ act: 'bin', id })}>Put in bin<span class="spoken">: ${name}</span></button>
      </span>
    </li>`;
  }

  private renderBinned(entry: ProjectEntry): TemplateResult {
    const { id, name } = entry;
    return html`<li>
      <span class="name">${name}</span>
      <span class="when">changed ${when(entry.changed)}</span>
      <span class="row">
        <button type="button" @click=${() => this.act({ act: 'restore', id })}>Take out<span class="spoken">: ${name}</span></button>
        <button type="button" class=${this.sure === id ? 'sure' : ''} @click=${() => this.delete(id)}>${this.sure === id ? 'Delete for good: press again' : 'Delete for good'}<span class="spoken">: ${name}</span></button>
      </span>
    </li>`;
  }

  private renderDamaged(): TemplateResult {
    return html`<h3>Set aside</h3>
      <p>These could not be read. Nothing of them is thrown away: take the text away as a file, it may be mended by hand.</p>
      <ul>
        ${this.damaged.map(
          (record) => html`<li>
            <span class="name">found ${when(record.found)}: ${record.why}</span>
            <span class="row">
              <button type="button" @click=${() => this.act({ act: 'rescue', key: record.key })}>Take the text away</button>
              <button type="button" @click=${() => this.act({ act: 'forget', key: record.key })}>Forget it</button>
            </span>
          </li>`,
        )}
      </ul>`;
  }
}

/** A moment in the words of the person's language and place. */
function when(ms: number): string {
  return new Date(ms).toLocaleString(undefined, { dateStyle: 'medium', timeStyle: 'short' });
}

customElements.define('hm-projects', HmProjects);

declare global {
  interface HTMLElementTagNameMap {
    'hm-projects': HmProjects;
  }
}
