import type { ReactiveController, ReactiveControllerHost } from 'lit';
import type { Result } from '../../src/result/types.ts';

/** A frame of a film over the temperature, shown on the plate instead of the design's own result. */
export interface Frame {
  result: Result;
  /** "frame at 77 K" */ words: string;
}

/** Holds the frame that the plate shows. It belongs to one project: an element that is taken away cannot say that its film is over. */
export class FrameController implements ReactiveController {
  #frame: Frame | null = null;
  #project: string | null = null;
  readonly #host: ReactiveControllerHost;

  constructor(host: ReactiveControllerHost) {
    this.#host = host;
    host.addController(this);
  }

  hostConnected(): void {}

  show(frame: Frame | null, project: string | null): void {
    this.#frame = frame;
    this.#project = project;
    this.#host.requestUpdate();
  }

  of(project: string | null): Frame | null {
    return this.#project === project ? this.#frame : null;
  }
}
