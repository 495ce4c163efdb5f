import { LitElement, html, nothing, type PropertyValues, type TemplateResult } from 'lit';
import type { Complaint } from '../../src/design/complaint.ts';
import type { ContactInput, Design } from '../../src/design/types.ts';
import { setContact, type Side } from '../../src/state/commands/index.ts';
import { complaintAt, complaintsWithin } from '../shared/complaint-at.ts';
import { tell } from '../shared/events.ts';
import { formLook } from '../shared/form-look.ts';
import { look } from '../shared/look.ts';
import type { MetalChoice } from '../shared/menus.ts';
import { select } from '../shared/select.ts';
import '../hm-field/hm-field.ts';

type BarrierContact = Extract<ContactInput, { kind: 'barrier' }>;

const START = { barrier: '0.7 eV', carrier: 'n' } as const;

const KINDS = [
  { value: 'neutral', text: 'neutral (no bending)' },
  { value: 'barrier', text: 'metal or barrier' },
  { value: 'pinned', text: 'pinned surface' },
  { value: 'open', text: 'open surface' },
];

/**
 * What stands at one end of the stack.
 *
 * @fires hm-edit
 */
export class HmContactForm extends LitElement {
  static override styles = [look, formLook];
  static override shadowRootOptions: ShadowRootInit = { ...LitElement.shadowRootOptions, delegatesFocus: true };
  static override properties = { design: { attribute: false }, side: {}, metals: { attribute: false }, complaints: { attribute: false } };

  declare design: Design;
  declare side: Side;
  declare metals: readonly MetalChoice[];
  declare complaints: readonly Complaint[];
  /** the last barrier that was typed: a metal brings its own, and this one can be taken up again with the metal's name */ private typed: Pick<BarrierContact, 'barrier' | 'carrier'> = START;

  constructor() {
    super();
    this.side = 'top';
    this.metals = [];
    this.complaints = [];
  }

  protected override willUpdate(changed: PropertyValues<this>): void {
    if (changed.has('side')) this.typed = START;
    const contact = this.design?.[this.side];
    if (contact?.kind === 'barrier' && contact.barrier !== undefined) this.typed = { barrier: contact.barrier, carrier: contact.carrier ?? 'n' };
  }

  override render(): TemplateResult | typeof nothing {
    if (!this.design) return nothing;
    const contact = this.design[this.side];
    return html`<div class="row">
      ${select({ id: 'kind', label: 'kind of contact', value: contact.kind, options: KINDS, complaint: complaintsWithin(this.complaints, this.side, ['metal', 'barrier', 'pinning', 'level', 'sheetCharge', 'carrier'].map((k) => `${this.side}.${k}`))[0], onChoice: (kind) => this.edit(this.startOf(kind as ContactInput['kind']), 'kind') })}
      ${contact.kind === 'barrier' ? this.renderBarrier(contact) : nothing}
      ${contact.kind === 'pinned' ? this.field('level', 'Ec − EF at the surface', contact.level, 'eV', (level) => ({ kind: 'pinned', level })) : nothing}
      ${contact.kind === 'open' ? this.field('sheetCharge', 'sheet charge (cm⁻² or C/m²)', contact.sheetCharge ?? '', '', (text) => (text === '' ? { kind: 'open' } : { kind: 'open', sheetCharge: text }), 'none') : nothing}
    </div>`;
  }

  private renderBarrier(contact: BarrierContact): TemplateResult {
    const given = contact.barrier !== undefined;
    // A barrier needs no metal, but may name the one that it is of; one that only this design's file names stays on the menu.
    const named = this.metals.map((m) => ({ value: m.id, text: m.id === m.name ? m.id : `${m.id}, ${m.name}` }));
    const { metal = '', barrier, carrier, pinning, ...rest } = contact;
    const unlisted = given && metal !== '' && !this.metals.some(({ id }) => id === metal) ? [{ value: metal, text: metal }] : [];
    const options = [{ value: '', text: given ? 'none named' : 'none, its barrier is given' }, ...unlisted, ...named];
    const from = given ? 'given' : 'metal';
    return html`
      ${select({ id: 'metal', label: 'metal', value: metal, options, complaint: complaintAt(this.complaints, `${this.side}.metal`), onChoice: (id) => this.edit(id === '' ? { ...rest, ...this.typed } : { ...rest, metal: id, pinning }, 'metal') })}
      ${metal === ''
        ? nothing
        : select({ id: 'from', label: 'its barrier', value: from, options: [{ value: 'metal', text: 'as known of the metal' }, { value: 'given', text: 'given here' }], onChoice: (choice) => this.edit(choice === 'given' ? { ...rest, metal, ...this.typed } : { ...rest, metal, pinning }, 'barrier') })}
      ${given
        ? html`${this.field('barrier', 'barrier height', barrier ?? '', 'eV', (text) => ({ ...contact, barrier: text }))}
            ${select({ id: 'carrier', label: 'for', value: carrier ?? 'n', options: [{ value: 'n', text: 'electrons' }, { value: 'p', text: 'holes' }], onChoice: (c) => this.edit({ ...contact, carrier: c as 'n' | 'p' }, 'barrier') })}`
        : this.renderPinning(contact)}
      <label class="check"><input type="checkbox" .checked=${contact.imageForce === true} @change=${(e: Event) => this.edit({ ...contact, imageForce: (e.target as HTMLInputElement).checked }, 'image force')} />image-force lowering</label>
    `;
  }

  private renderPinning(contact: BarrierContact): TemplateResult {
    const { pinning } = contact;
    const words = pinning === 'material' || pinning === 'none' || pinning === 'full' ? pinning : pinning === undefined ? 'material' : 'own';
    return html`
      ${select({
        id: 'pinning', label: 'Fermi-level pinning', value: words, complaint: words === 'own' ? null : complaintAt(this.complaints, `${this.side}.pinning`),
        options: [{ value: 'material', text: 'measured, else of the material' }, { value: 'none', text: 'none (S = 1)' }, { value: 'full', text: 'full (S = 0)' }, { value: 'own', text: 'own S' }],
        onChoice: (choice) => this.edit({ ...contact, pinning: choice === 'own' ? '0.5' : (choice as 'material' | 'none' | 'full') }, 'pinning'),
      })}
      ${words === 'own' ? this.field('pinning', 'S', String(pinning), '', (text) => ({ ...contact, pinning: text })) : nothing}
    `;
  }

  private field(key: string, label: string, value: string, unit: string, next: (text: string) => ContactInput, hint = ''): TemplateResult {
    return html`<hm-field .label=${label} .value=${value} .unit=${unit} .hint=${hint} .complaint=${complaintAt(this.complaints, `${this.side}.${key}`)} @field-accept=${(e: CustomEvent<string>) => this.edit(next(e.detail), label)}></hm-field>`;
  }

  /** A contact to start from when another kind is chosen. */
  private startOf(kind: ContactInput['kind']): ContactInput {
    if (kind === 'barrier') return this.metals.length > 0 ? { kind, metal: this.metals[0].id, imageForce: true } : { kind, ...START, imageForce: true };
    if (kind === 'pinned') return { kind, level: '0.7 eV' };
    return { kind };
  }

  private edit(contact: ContactInput, what: string): void {
    const next = Object.fromEntries(Object.entries(contact).filter(([, value]) => value !== undefined)) as unknown as ContactInput;
    tell(this, 'hm-edit', { next: setContact(this.design, this.side, next), label: `${what} of the ${this.side} contact` });
  }
}

customElements.define('hm-contact-form', HmContactForm);

declare global {
  interface HTMLElementTagNameMap {
    'hm-contact-form': HmContactForm;
  }
}
