import { availableParallelism } from 'node:os';
import { isMainThread } from 'node:worker_threads';
import { serveThread, threadSide } from '../workers/pool-thread.ts';
import { run } from './run.ts';

/** Entry of the command line: the process around run.ts. Its threads start at this very file. */
if (isMainThread) {
  process.stdout.on('error', (error: NodeJS.ErrnoException) => {
    // A reader that has had enough ("| head") is no fault.
    if (error.code === 'EPIPE') process.exit(0);
    throw error;
  });

  process.exitCode = await run(process.argv.slice(2), {
    out: (text) => void process.stdout.write(text),
    error: (text) => void process.stderr.write(text),
    async stdin() {
      const chunks: Buffer[] = [];
      for await (const chunk of process.stdin) chunks.push(chunk as Buffer);
      return Buffer.concat(chunks).toString('utf8');
    },
    ...(process.stderr.isTTY ? { progress: (text: string) => void process.stderr.write(`\r${text}\u001b[K`) } : {}),
    startWorker: () => threadSide(new URL(import.meta.url)),
    cores: availableParallelism(),
    stopSignal() {
      const stop = new AbortController();
      // Once each: whoever presses Ctrl-C again does not want to wait.
      for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => stop.abort());
      return stop.signal;
    },
  });
} else serveThread();
