import { useEffect, useState } from 'react';
import type { SceneDocument } from '../../shared/scene-document';
import { figures } from '../../shared/units';
import type { energyKept, TimeMethod } from '../../solver/index';
import { stageModule } from '../stage/stage-module';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Card } from '../ui/card';
import { DimensionSlider } from '../ui/dimension-slider';
import { Text } from '../ui/text';
import type { Edit } from './edit';

type Motion = Extract<SceneDocument['time'], { kind: 'motion' }>;

const MOTION = { kind: 'motion', framesPerSecond: 24, frames: 48, substeps: 2, method: 'backward-euler' } as const;

/** Frames, substeps and method, and the damping the choice brings with it. */
export function TimeCard({ document, edit }: { document: SceneDocument; edit: Edit }) {
  const { time } = document;
  const [rule, setRule] = useState<typeof energyKept | null>(null);
  useEffect(() => {
    void stageModule().then((module) => setRule(() => module.energyKept));
  }, []);
  const set = (kind: string, change: Partial<Motion>) =>
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
              { value: 'bdf2', label: 'BDF2' },
              { value: 'hht', label: 'HHT' },
              { value: 'tr-bdf2', label: 'TR-BDF2' },
            ]}
          />
          <Text variant="note" color="ink2">
            {`${METHOD_WORDS[time.method]}${rule ? lossWords(rule, time) : ''}`}
          </Text>
        </>
      )}
    </Card>
  );
}

const METHOD_WORDS: Record<TimeMethod, string> = {
  'backward-euler': 'The most robust.',
  bdf2: 'Robust, and keeps far more of a wobble.',
  hht: 'Keeps a wobble alive; best without contact.',
  'tr-bdf2': 'Keeps most; two solves a step.',
};

/** What the method itself takes from two wobbles in a second. */
function lossWords(rule: typeof energyKept, { method, framesPerSecond, substeps }: Motion): string {
  const kept = (hertz: number) => {
    const percent = 100 * rule(method, hertz, 1 / (framesPerSecond * substeps));
    return percent < 0.1 ? 'less than 0.1' : figures(percent, 2);
  };
  return ` By itself it leaves a wobble of 2 Hz ${kept(2)} % of its energy after a second, one of 6 Hz ${kept(6)} %. More substeps keep more.`;
}
