import { figures } from '../../shared/units';
import { estimateWords } from '../solver-client/estimate-words';
import { Button } from '../ui/button';
import { Fact } from '../ui/fact';
import { Progress } from '../ui/progress';
import { Text } from '../ui/text';
import type { Convergence } from './use-convergence';

/** How far the preview is from what finer parts say, asked for with its cost said before. */
export function ConvergenceReadout({
  convergence: { shown, start, stop },
  seconds,
}: {
  convergence: Convergence;
  /** forecast of its cost; null while the body is not ready */
  seconds: number | null;
}) {
  if (shown.state === 'running') {
    return (
      <Progress
        label="Comparing with finer parts"
        share={shown.share}
        left="Comparing with finer parts"
        right={`${Math.round(100 * shown.share)} %`}
        stop={{ label: 'Stop comparing', onPress: stop }}
      />
    );
  }
  const words = shown.state === 'done' ? estimateWords(shown.estimate) : null;
  return (
    <>
      {words ? <Fact name="Converged?" words={words.answer} note={words.note} /> : null}
      {shown.state === 'failed' ? (
        <Text variant="note" color="apricot" role="alert">
          {shown.message}
        </Text>
      ) : null}
      {words ? null : (
        <Button
          label="Compare with finer parts"
          cost={seconds === null ? undefined : `about ${figures(Math.max(1, seconds), seconds < 10 ? 1 : 2)} s`}
          disabledReason={seconds === null ? 'The body is being prepared.' : null}
          onPress={start}
        />
      )}
    </>
  );
}
