import { html, type TemplateResult } from 'lit';
import { keyed } from 'lit/directives/keyed.js';
import type { Session } from '../../src/state/session.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import type { PlateAxes } from '../hm-plate/hm-plate.ts';
import type { PlateView } from '../hm-plate/plate-view.ts';
import type { Verdicts } from '../hm-requirements/hm-requirements.ts';
import '../hm-assumptions/hm-assumptions.ts';
import '../hm-desk/hm-desk.ts';
import '../hm-notes/hm-notes.ts';
import '../hm-plate/hm-plate.ts';
import '../hm-rail/hm-rail.ts';
import '../hm-strip/hm-strip.ts';
import '../hm-variables/hm-variables.ts';
import type { Choices } from './choices.ts';
import type { Frame } from './frame-controller.ts';
import type { OverlayController } from './overlay-controller.ts';

export interface WorkArea {
  session: Session;
  /** id of the open project: another one gets a fresh desk */ project: string | null;
  /** of the plate, for the rail and the strip; null until it is drawn */ axes: PlateAxes | null;
  plateView: PlateView;
  style: 'light' | 'dark';
  /** the figures belong to an earlier design */ stale: boolean;
  /** of a film, shown on the plate instead of the design's own result */ frame: Frame | null;
  choices: Choices;
  overlay: OverlayController;
  verdicts: Verdicts;
  run: RunJob;
  plateDrawn(event: CustomEvent<PlateAxes>): void;
}

/** Everything between the head and the dialogs: plate, rail, strip, what is given, desk. */
export function workArea({ session, project, axes, plateView, style, stale, frame, choices, overlay, verdicts, run, plateDrawn }: WorkArea): TemplateResult {
  const { design, view } = session;
  const { result, complaints } = session.findings;
  const { chosen, depth_nm } = session.moment;
  return html`<main>
    <div class="diagram">
      ${frame ? html`<p class="frame" role="status">The picture is a ${frame.words} of the film; close the film to see the design's own.</p>` : null}
      <hm-plate .result=${frame?.result ?? result} .view=${plateView} .variants=${overlay.over} .ownName=${overlay.shown.all.list.find(({ id }) => id === overlay.shown.all.open)?.name ?? ''} .stale=${stale} .depth_nm=${depth_nm} .chosen=${chosen} @plate-drawn=${plateDrawn}></hm-plate>
    </div>
    <div class="beside"><hm-rail .result=${frame?.result ?? result} .energy=${axes?.energy ?? null} .height=${axes?.height ?? 400} .depth_nm=${depth_nm} .styleName=${style} .stale=${stale}></hm-rail></div>
    <div class="under">
      <h2 class="spoken">Layer stack</h2>
      <hm-strip
        .design=${design}
        .result=${result}
        .axis=${axes?.depth ?? null}
        .chosen=${chosen}
        .complaints=${complaints}
        .materials=${choices.materials}
        .dopants=${choices.dopants}
        .metals=${choices.metals}
      ></hm-strip>
    </div>
    <div class="assumed"><hm-assumptions .design=${design}></hm-assumptions>
      <hm-notes .design=${design}></hm-notes></div>
    <div class="variables"><hm-variables .design=${design} .complaints=${complaints}></hm-variables></div>
    <div class="figures">
      <h2 class="spoken">Figures, requirements, sizing</h2>
      ${keyed(
        project,
        html`<hm-desk
          .design=${design}
          .complaints=${complaints}
          .result=${result}
          .stale=${stale}
          .view=${view}
          .chosen=${chosen}
          .verdicts=${verdicts}
          .variants=${overlay.shown}
          .against=${overlay.against}
          .run=${run}
          .styleName=${style}
        ></hm-desk>`,
      )}
    </div>
  </main>`;
}
