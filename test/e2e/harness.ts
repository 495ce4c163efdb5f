/**
 * Scenarios against the built page in a real browser. A file `*.e2e.ts` registers them with `scenario`; src/tools/e2e.mjs runs each in a fresh
 * browser profile on a local server and fails it on anything the page was not asked to do: an error, a console error (breaches of the security
 * policy are among them), a request that fails, a request to another server.
 */
import type { Page } from 'puppeteer-core';

export interface Visit {
  page: Page;
  /** Address of the page's folder on the local server, with a slash at its end. */
  url: string;
  /** Opens the page and waits until it has loaded and is quiet; `path` is added to the address, e.g. `#design`. */
  open(path?: string): Promise<void>;
  /** What went wrong so far. A scenario that provokes an error checks it here and takes it out. */
  problems: string[];
  /** Serves a copy of the built page of the scenario's own, to be changed or taken away. */
  serveCopy(): Promise<PageServer>;
}

export interface PageServer {
  /** Where the copy lies. */
  folder: string;
  url: string;
  /** After a change in the folder: makes it a whole build again, with a service worker that names its files. */
  publish(): Promise<void>;
  /** The network is cut: nothing answers any more. */
  close(): Promise<void>;
}

export interface Scenario {
  /** A sentence of behaviour. */
  name: string;
  run(visit: Visit): Promise<void>;
}

/** Every scenario of the file at hand, in order. */
export const scenarios: Scenario[] = [];

/** Registers a scenario: it fails by throwing. Check with `node:assert/strict`. */
export function scenario(name: string, run: Scenario['run']): void {
  scenarios.push({ name, run });
}
