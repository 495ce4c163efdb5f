import { poolReplies } from './pool-replies.ts';
import type { PoolReply, PoolRequest } from './pool-messages.ts';

/** The part of a worker's global scope that is used; the page's types know only windows. */
interface Scope {
  postMessage(reply: PoolReply): void;
  onmessage: ((event: MessageEvent<PoolRequest>) => void) | null;
}

const replyTo = poolReplies();
const scope = self as unknown as Scope;
scope.onmessage = ({ data }) => {
  const reply = replyTo(data);
  if (reply) scope.postMessage(reply);
};
