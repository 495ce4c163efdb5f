/** A requirement judged over its temperatures and all tolerances. */
export interface RequirementResult {
  quantity: string;
  of: string;
  bound: 'max' | 'min';
  /** of `limit` and `worst`; empty for a pure number and for true or false */ unit: string;
  limit: number | boolean;
  over: 'temperature' | 'temperatureRange';
  /** null where there was a figure nowhere, and where `blocks` */ worst: number | boolean | null;
  /** at the worst point the contact blocks: its resistivity is beyond every number, and misses every largest one */ blocks: boolean;
  /** where that is; tolerances that are not moved there are left out */ at: {
    temperature_K: number;
    /** `count` is in units of the whole tolerance, -1 to 1 */ tolerances: { name: string; count: number; words: string }[];
    /** "-40 degC, Ncap -20 %, barrier +50 meV": without the tolerances that move nothing there, and of many the six that move it most */ words: string;
  } | null;
  /** a point without an answer is never counted as met */ met: boolean;
  /** false where it is neither met nor found not met, since some points have no answer */ judged: boolean;
  /** ratio: from 1 up it is met, null without end; difference: from 0 up, in `margin_unit`; null too without a figure */ margin: number | null;
  margin_kind: 'ratio' | 'difference';
  margin_unit: string;
  /** points drawn inside the ranges were no worse than the corners */ corners_sufficed: boolean;
  /** points where the solver gave no accepted answer, or the result has no such figure; the first of them with its reason */ unanswered: { points: number; temperature_K: number; words: string; reason: string } | null;
}
