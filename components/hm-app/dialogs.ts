import { html, type TemplateResult } from 'lit';
import type { Design } from '../../src/design/types.ts';
import type { RequirementResult, Result } from '../../src/result/types.ts';
import type { RunJob } from '../../src/workers/job-client.ts';
import type { PlateView } from '../hm-plate/plate-view.ts';
import type { HmProjects } from '../hm-projects/hm-projects.ts';
import type { OpenedFile } from '../shared/opened-file.ts';
import type { VariantList } from '../../src/state/variants.ts';
import '../hm-about/hm-about.ts';
import '../hm-dialog/hm-dialog.ts';
import '../hm-help/help-door.ts';
import '../hm-leave/hm-leave.ts';
import '../hm-projects/hm-projects.ts';
import '../hm-starters/hm-starters.ts';

export interface PageDialogs {
  design: Design;
  result: Result | null;
  stale: boolean;
  plateLook: PlateView;
  /** judged rows of this very design; null while they are not known */ requirements: readonly RequirementResult[] | null;
  variants: VariantList;
  /** starts a job in a worker of its own */ run: RunJob;
  /** that the project was opened from and can be written back to */ file: OpenedFile | null;
  entries: HmProjects['entries'];
  damaged: HmProjects['damaged'];
  openId: string | null;
  /** about the last act on a project */ remark: string;
  /** the question whether to lose what could not be saved */ unsaved: { closed(): void; save(): void; lose(): void };
}

/** The page's dialogs, shut until they are asked for. The review sheet's code is fetched when it first opens. */
export function pageDialogs({ design, result, stale, plateLook, requirements, variants, run, file, entries, damaged, openId, remark, unsaved }: PageDialogs): TemplateResult {
  return html`
    <hm-projects .entries=${entries} .damaged=${damaged} .openId=${openId} .remark=${remark}></hm-projects>
    <hm-starters></hm-starters>
    <hm-leave .design=${design} .result=${result} .stale=${stale} .plateLook=${plateLook} .file=${file}></hm-leave>
    <hm-sheet .design=${design} .result=${result} .stale=${stale} .plateLook=${plateLook} .requirements=${requirements} .run=${run} .others=${variants.list.filter(({ id, removed }) => id !== variants.open && !removed)} .ownName=${variants.list.find(({ id }) => id === variants.open)?.name ?? ''}></hm-sheet>
    <hm-about .program=${result?.provenance.program ?? ''} .model=${result?.provenance.model ?? ''} .presets=${result?.provenance.presets ?? ''}></hm-about>
    <hm-help-door></hm-help-door>
    <hm-dialog id="unsaved" heading="Not saved" @hm-closed=${unsaved.closed}>
      <p>What is on this page could not be saved. Opening another project now would lose it.</p>
      <p class="row">
        <button type="button" @click=${unsaved.save}>Take it away as a file</button>
        <button type="button" @click=${unsaved.lose}>Open the other and lose it</button>
      </p>
    </hm-dialog>
  `;
}
