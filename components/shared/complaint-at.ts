import type { Complaint } from '../../src/design/complaint.ts';

/** The sentence about exactly this place, or null. */
export function complaintAt(complaints: readonly Complaint[], path: string): string | null {
  return complaints.find((c) => c.path === path)?.message ?? null;
}

/** The sentences about this place and all places within it, except places that `apart` names because they show their own. */
export function complaintsWithin(complaints: readonly Complaint[], path: string, apart: readonly string[] = []): string[] {
  return complaints.filter((c) => isWithin(c.path, path) && !apart.some((p) => isWithin(c.path, p))).map((c) => c.message);
}

function isWithin(path: string, place: string): boolean {
  return path === place || path.startsWith(`${place}.`) || path.startsWith(`${place}[`);
}
