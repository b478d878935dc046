import type { SceneDocument } from '../../shared/scene-document';
import { figures } from '../../shared/units';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Card } from '../ui/card';
import { DimensionSlider } from '../ui/dimension-slider';
import { Text } from '../ui/text';
import type { Edit } from './edit';

const MOTION = { kind: 'motion', framesPerSecond: 24, frames: 48, substeps: 2, method: 'backward-euler' } as const;

/** Frames, substeps and method, and the damping the choice brings with it. */
export function TimeCard({ document, edit }: { document: SceneDocument; edit: Edit }) {
  const { time } = document;
  const set = (kind: string, change: Partial<Extract<SceneDocument['time'], { kind: 'motion' }>>) =>
    edit(`time-${kind}`, (d) => (d.time.kind === 'motion' ? { ...d, time: { ...d.time, ...change } } : d));
  return (
    <Card
      title="Time"
      summary={
        time.kind === 'motion' ? `${figures(time.frames / time.framesPerSecond)} s of motion` : 'rest under load'
      }
    >
      <ChoiceOfFew
        label="What is solved"
        value={time.kind}
        onChange={(kind) =>
          edit('time-kind', (d) => ({
            ...d,
            time: kind === 'motion' ? { ...MOTION } : { kind: 'static', loadSteps: 4 },
          }))
        }
        options={[
          { value: 'motion', label: 'Motion' },
          { value: 'static', label: 'Rest under load' },
        ]}
      />
      {time.kind === 'static' ? (
        <DimensionSlider
          label="Load steps"
          value={time.loadSteps}
          min={1}
          max={40}
          step={1}
          format={(v) => String(Math.round(v))}
          onChange={(v) => edit('load-steps', (d) => ({ ...d, time: { kind: 'static', loadSteps: Math.round(v) } }))}
        />
      ) : (
        <>
          <DimensionSlider
            label="Frames per second"
            value={time.framesPerSecond}
            min={12}
            max={120}
            step={1}
            format={(v) => figures(v, 4)}
            refuse={(v) => (v >= 1 && v <= 240 ? null : 'Frames per second go from 1 to 240.')}
            onChange={(v) => set('fps', { framesPerSecond: v })}
          />
          <DimensionSlider
            label="Frames to bake"
            value={time.frames}
            min={1}
            max={480}
            step={1}
            format={(v) => String(Math.round(v))}
            refuse={(v) => (Number.isInteger(v) && v >= 1 ? null : 'Bake at least one frame.')}
            onChange={(v) => set('frames', { frames: Math.round(v) })}
          />
          <DimensionSlider
            label="Substeps a frame"
            value={time.substeps}
            min={1}
            max={16}
            step={1}
            format={(v) => String(Math.round(v))}
            refuse={(v) => (Number.isInteger(v) && v >= 1 ? null : 'At least one substep.')}
            onChange={(v) => set('substeps', { substeps: Math.round(v) })}
          />
          <ChoiceOfFew
            label="Method"
            value={time.method}
            onChange={(method) => set('method', { method })}
            options={[
              { value: 'backward-euler', label: 'Backward Euler' },
              { value: 'hht', label: 'HHT' },
            ]}
          />
          <Text variant="note" color="ink2">
            {time.method === 'backward-euler'
              ? `Robust, and it damps by itself: a wobble of 2 Hz keeps ${figures(100 * backwardEulerEnergy(2, time.framesPerSecond * time.substeps), 2)} % of its energy after a second. More substeps keep more.`
              : 'Keeps a wobble alive. Slower; best without contact.'}
          </Text>
        </>
      )}
    </Card>
  );
}

/** Energy left after one second of an undamped oscillator of `hertz`: (1 + ω²h²)^(−steps), closed form of backward Euler. */
export function backwardEulerEnergy(hertz: number, stepsPerSecond: number): number {
  const wh = (2 * Math.PI * hertz) / stepsPerSecond;
  return (1 + wh * wh) ** -stepsPerSecond;
}
