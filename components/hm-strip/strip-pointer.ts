import type { ReactiveController, ReactiveControllerHost } from 'lit';
import { draggedThickness, startEdgeDrag, type EdgeDrag } from './edge-drag.ts';
import { landing, type Span } from './strip-geometry.ts';

/** What a drag needs of the strip. */
export interface StripSurface extends ReactiveControllerHost {
  thicknessText(layer: number): string;
  /** columns as they stand, px from the left of the strip */ spans(): Span[];
  /** px of the strip's left end in the window */ leftEnd(): number;
  /** live, while the edge is held */ dragThickness(layer: number, text: string, join: string): void;
  dropEdge(layer: number, before: string): void;
  dropColumn(from: number, to: number): void;
}

/** px before a press on a column becomes a move of it */
const LIFT = 7;

/** Drags on the strip: an edge for a thickness, a column for its place. Escape and a lost pointer put back what was there. */
export class StripPointer implements ReactiveController {
  edge: EdgeDrag | null = null;
  /** a column that follows the pointer, and where it would land */ lifted: { from: number; to: number } | null = null;
  private pressed: { layer: number; x: number } | null = null;
  private carried = false;

  constructor(private readonly host: StripSurface) {
    host.addController(this);
  }

  hostDisconnected(): void {
    this.forget();
  }

  get busy(): boolean {
    return this.edge !== null || this.lifted !== null;
  }

  /** After a drag the browser still tells of a click: it is none. True once. */
  swallowsClick(): boolean {
    const { carried } = this;
    this.carried = false;
    return carried;
  }

  press(event: PointerEvent): void {
    this.carried = false;
    const column = (event.target as Element).closest<HTMLElement>('[data-layer]');
    if (event.button === 0 && column && this.host.spans().length > 1) this.pressed = { layer: Number(column.dataset.layer), x: event.clientX };
  }

  /** @param width  px of the whole layer, also of what lies outside of the part in view */
  grab(event: PointerEvent, layer: number, width: number, thickness_nm: number): void {
    event.preventDefault();
    this.edge = startEdgeDrag(layer, event.clientX, width, thickness_nm, this.host.thicknessText(layer));
    (event.currentTarget as Element).setPointerCapture(event.pointerId);
    this.host.requestUpdate();
  }

  readonly move = (event: PointerEvent): void => {
    const { edge, pressed, host } = this;
    if (edge) {
      const text = draggedThickness(edge, event.clientX, event.shiftKey);
      if (text !== host.thicknessText(edge.layer)) host.dragThickness(edge.layer, text, edge.join);
    } else if (pressed && event.buttons & 1) {
      if (!this.carried && Math.abs(event.clientX - pressed.x) > LIFT) {
        (event.currentTarget as Element).setPointerCapture(event.pointerId);
        this.carried = true;
      }
      if (this.carried) this.carry(landing(event.clientX - host.leftEnd(), host.spans(), pressed.layer), pressed.layer);
    } else this.pressed = null;
  };

  readonly up = (): void => {
    const { edge, lifted, host } = this;
    this.forget();
    if (edge) host.dropEdge(edge.layer, edge.text);
    else if (lifted) host.dropColumn(lifted.from, lifted.to);
  };

  readonly cancel = (): void => {
    const { edge, host } = this;
    this.forget();
    if (edge && host.thicknessText(edge.layer) !== edge.text) host.dragThickness(edge.layer, edge.text, edge.join);
  };

  private carry(to: number, from: number): void {
    if (this.lifted?.to === to) return;
    this.lifted = { from, to };
    this.host.requestUpdate();
  }

  private forget(): void {
    this.edge = null;
    this.lifted = null;
    this.pressed = null;
    this.host.requestUpdate();
  }
}
