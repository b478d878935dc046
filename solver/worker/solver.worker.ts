import { bestKernels } from '../kernels/best-kernels';
import type { Request, Response } from './messages';
import { SolverSession } from './session';

/** The web worker around a SolverSession: messages in and out, and a loop that leaves room for messages. */
interface WorkerScope {
  onmessage: ((event: { data: Request }) => void) | null;
  postMessage(message: Response, transfer: ArrayBufferLike[]): void;
}
const scope = self as unknown as WorkerScope;

const session = new SolverSession(
  bestKernels(),
  (response, transfer = []) => scope.postMessage(response, transfer),
  () => performance.now(),
);

let scheduled = false;
function schedule(wait: number): void {
  if (scheduled || !session.busy) return;
  scheduled = true;
  setTimeout(() => {
    scheduled = false;
    schedule(session.tick());
  }, wait);
}

scope.onmessage = ({ data }) => {
  session.handle(data);
  schedule(0);
};
