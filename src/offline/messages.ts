/** Asks a build that waits to take over from the one that runs. */
export const TAKE_OVER = 'halfmark:take-over';
