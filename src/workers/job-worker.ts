import type { JobReply, JobRequest } from './job-messages.ts';
import { runJob } from './job-replies.ts';

/** The part of a worker's global scope that is used; the page's types know only windows. */
interface Scope {
  postMessage(reply: JobReply): void;
  onmessage: ((event: MessageEvent<JobRequest>) => void) | null;
}

const scope = self as unknown as Scope;
scope.onmessage = ({ data }) => runJob(data, (reply) => scope.postMessage(reply), () => performance.now());
