/** What is wrong with an input: where, and a sentence that says what was found and what would do. */
export interface Complaint {
  /** "layers[2].thickness"; empty for the document as a whole */ path: string;
  message: string;
}

/** One line: the place, then the sentence. */
export function complaintLine(c: Complaint): string {
  return c.path === '' ? c.message : `${c.path}: ${c.message}`;
}

/** Thrown inside a reader, turned into complaints at its door. */
export class InputError extends Error {
  override readonly name = 'InputError';
  constructor(readonly complaints: Complaint[]) {
    super(complaints.map(complaintLine).join('\n'));
  }
}
