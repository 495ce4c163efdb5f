/** One value of the sized variable with the scores of the requirements there. */
export interface SizingNode {
  /** place in the range, 0..1, straight or in the logarithm of the variable */ u: number;
  value: number;
  /** 0 at a limit, above where it is met; null where there is no answer */ scores: readonly (number | null)[];
  /** the least score; -Infinity where one of them has no answer */ least: number;
  /** index of the least score; one without an answer goes first */ binding: number;
}

/** Values of the variable that were asked, in order. */
export class SizingNodes {
  readonly list: SizingNode[] = [];

  add(u: number, value: number, scores: readonly (number | null)[]): SizingNode {
    let binding = 0;
    scores.forEach((score, i) => { if (rank(score) < rank(scores[binding])) binding = i; });
    const node: SizingNode = { u, value, scores: [...scores], least: scores.length === 0 ? Infinity : rank(scores[binding]), binding };
    let at = this.list.length;
    while (at > 0 && this.list[at - 1].u > u) at--;
    this.list.splice(at, 0, node);
    return node;
  }

  /** The node of the largest least score; the first of equals. */
  get best(): SizingNode {
    return this.list.reduce((best, node) => (node.least > best.least ? node : best));
  }
}

function rank(score: number | null): number {
  return score === null ? -Infinity : score;
}

export const isMet = (node: SizingNode): boolean => node.least >= 0;
