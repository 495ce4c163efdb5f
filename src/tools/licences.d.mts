/** Types of licences.mjs for the build's own TypeScript. */
export const LICENCES_FILE: string;
