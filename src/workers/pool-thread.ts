import { parentPort, Worker } from 'node:worker_threads';
import { poolReplies } from './pool-replies.ts';
import type { PoolReply, PoolRequest } from './pool-messages.ts';
import type { PoolSide } from './pool.ts';

/** Serves a pool from inside a thread of Node. */
export function serveThread(): void {
  const replyTo = poolReplies();
  parentPort?.on('message', (request: PoolRequest) => {
    const reply = replyTo(request);
    if (reply) parentPort?.postMessage(reply);
  });
}

/** A thread of Node in the manner of a page's worker. @param script  one that calls serveThread where it is not the main thread */
export function threadSide(script: URL): PoolSide {
  const worker = new Worker(script);
  const side: PoolSide = { onmessage: null, onerror: null, postMessage: (message) => worker.postMessage(message), terminate: () => void worker.terminate() };
  worker.on('message', (data: PoolReply) => side.onmessage?.({ data }));
  worker.on('error', (error) => side.onerror?.({ message: error instanceof Error ? error.message : String(error) }));
  return side;
}
