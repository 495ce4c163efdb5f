import { InputError, type Complaint } from '../design/complaint.ts';
import type { Design } from '../design/types.ts';
import { mapJob, planMap, type MapRequest } from '../map/map-job.ts';
import { filmJob, planFilm, type FilmRequest } from '../sweep/film.ts';
import { planSweep, sweepJob, type SweepRequest } from '../sweep/sweep.ts';
import { planVariations, type VariationRequest } from '../tolerance/plan.ts';
import { variationJob } from '../tolerance/variations.ts';
import type { Job } from './job.ts';

/** A job as a worker is told of it: the document and what is asked of it. */
export type JobSpec =
  | { kind: 'sweep'; design: Design; request: SweepRequest }
  | { kind: 'film'; design: Design; request: FilmRequest }
  | { kind: 'map'; design: Design; request: MapRequest }
  | { kind: 'variations'; design: Design; request: VariationRequest };

/** @throws {InputError} what whoever sends a job finds by planning it first */
export function openJob(spec: JobSpec): Job<unknown> {
  switch (spec.kind) {
    case 'sweep':
      return sweepJob(planned(planSweep(spec.design, spec.request)));
    case 'film':
      return filmJob(planned(planFilm(spec.design, spec.request)));
    case 'map':
      return mapJob(planned(planMap(spec.design, spec.request)));
    case 'variations':
      return variationJob(planned(planVariations(spec.design, spec.request)));
  }
}

function planned<P>(reading: { ok: true; plan: P } | { ok: false; complaints: Complaint[] }): P {
  if (!reading.ok) throw new InputError(reading.complaints);
  return reading.plan;
}
