/** Types of offline-worker.mjs for the build's own TypeScript. */
export const WORKER_FILE: string;
export function keptFiles(folder: string): [file: string, integrity: string][];
export function writeOfflineWorker(folder: string): Promise<void>;
