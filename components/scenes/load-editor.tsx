import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, type LengthUnit } from '../../shared/units';
import { beaufortOf, beaufortSpeed, GUST_PLACES, windWords } from '../../shared/wind';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { DimensionSlider } from '../ui/dimension-slider';
import { Row } from '../ui/row';
import { Text } from '../ui/text';
import type { Edit } from './edit';
import { regionWords } from './region-words';

type Load = SceneDocument['loads'][number];
const AXES = ['x', 'y', 'z'] as const;

/** A push, a traction, pressure or wind in numbers. */
export function LoadEditor({
  load,
  edit,
  unit,
  picking,
  onPick,
}: {
  load: Load;
  edit: Edit;
  unit: LengthUnit;
  picking: boolean;
  onPick: (on: boolean) => void;
}) {
  const set = (change: (load: Load) => Load) =>
    edit(`load-${load.id}`, (d) => ({ ...d, loads: d.loads.map((l) => (l.id === load.id ? change(l) : l)) }));
  const remove = (
    <Button
      kind="quiet"
      label="Remove"
      hint={`Remove load ${load.id}`}
      onPress={() => edit('load-remove', (d) => ({ ...d, loads: d.loads.filter((l) => l.id !== load.id) }))}
    />
  );
  const vector =
    load.kind === 'push'
      ? load.force
      : load.kind === 'wind'
        ? load.velocity
        : load.kind === 'traction'
          ? load.traction
          : null;
  const quantity = load.kind === 'push' ? 'N' : load.kind === 'wind' ? 'm/s' : 'Pa';
  const reach = vector
    ? Math.max(
        load.kind === 'wind' ? 40 : 10 ** Math.ceil(Math.log10(Math.max(1e-3, ...vector.map(Math.abs)) * 2)),
        ...vector.map(Math.abs),
      )
    : 0;
  return (
    <View style={{ gap: 6 }}>
      <Row
        title={`${load.id} ${load.name}`}
        note={
          'region' in load
            ? regionWords(load.region, unit)
            : `on the windward side, ${load.kind === 'wind' ? windWords(Math.hypot(...load.velocity)) : ''}`
        }
        value={
          vector
            ? `${figures(Math.hypot(...vector))} ${quantity}`
            : load.kind === 'pressure'
              ? `${figures(load.pressure)} Pa`
              : load.kind === 'twist'
                ? `${figures(load.moment)} N m`
                : ''
        }
        state={remove}
      />
      {'region' in load ? (
        <Button
          label={picking ? 'Done picking' : 'Pick on the body'}
          hint={`Region of ${load.id}`}
          pressed={picking}
          onPress={() => onPick(!picking)}
          style={{ alignSelf: 'flex-start' }}
        />
      ) : null}
      {load.kind === 'wind' ? <WindForce load={load} set={(next) => set(() => next)} /> : null}
      {load.kind === 'twist' ? (
        <ChoiceOfFew
          label={`Axis of ${load.id}`}
          value={AXES[load.axis.findIndex((x) => x !== 0)] ?? 'x'}
          onChange={(axis) =>
            set((l) =>
              l.kind === 'twist'
                ? { ...l, axis: AXES.map((a) => (a === axis ? 1 : 0)) as [number, number, number] }
                : l,
            )
          }
          options={AXES.map((axis) => ({ value: axis, label: `About ${axis}` }))}
        />
      ) : null}
      {vector ? (
        AXES.map((axis, d) => (
          <DimensionSlider
            key={axis}
            label={`${load.name} along ${axis}`}
            value={vector[d]!}
            min={-reach}
            max={reach}
            step={reach / 100}
            unit={quantity}
            format={(v) => figures(v)}
            onChange={(v) =>
              set((l) => {
                const next = vector.map((x, k) => (k === d ? Number(v.toPrecision(4)) : x)) as [number, number, number];
                if (l.kind === 'push') return { ...l, force: next };
                if (l.kind === 'wind') return { ...l, velocity: next };
                return l.kind === 'traction' ? { ...l, traction: next } : l;
              })
            }
          />
        ))
      ) : load.kind === 'twist' ? (
        <DimensionSlider
          label="Moment"
          hint={`about ${AXES[load.axis.findIndex((x) => x !== 0)] ?? 'its axis'}`}
          value={load.moment}
          min={-twistReach(load.moment)}
          max={twistReach(load.moment)}
          step={twistReach(load.moment) / 100}
          unit="N m"
          format={(v) => figures(v)}
          onChange={(v) => set((l) => (l.kind === 'twist' ? { ...l, moment: Number(v.toPrecision(4)) } : l))}
        />
      ) : load.kind === 'pressure' ? (
        <DimensionSlider
          label="Pressure"
          value={load.pressure}
          min={-5000}
          max={5000}
          step={50}
          unit="Pa"
          format={(v) => figures(v)}
          onChange={(v) => set((l) => (l.kind === 'pressure' ? { ...l, pressure: v } : l))}
        />
      ) : (
        <Text variant="note" color="ink2">
          Set by the scene file.
        </Text>
      )}
    </View>
  );
}

const twistReach = (moment: number) => 10 ** Math.ceil(Math.log10(Math.max(1e-4, 2 * Math.abs(moment))));

type Wind = Extract<Load, { kind: 'wind' }>;

/** Strength on the Beaufort scale, direction kept, and how gusty it is. */
function WindForce({ load, set }: { load: Wind; set: (load: Wind) => void }) {
  const speed = Math.hypot(...load.velocity);
  const place = GUST_PLACES.find(({ factor }) => Math.abs(factor - (load.gusts?.factor ?? 1)) < 0.005)?.value ?? null;
  return (
    <>
      <DimensionSlider
        label="Beaufort"
        hint={windWords(speed)}
        value={beaufortOf(speed)}
        min={0}
        max={12}
        step={1}
        format={(v) => String(Math.round(v))}
        refuse={(v) => (v >= 0 && v <= 12 ? null : 'The scale goes from 0 to 12.')}
        onChange={(v) => {
          const next = beaufortSpeed(Math.round(v));
          const along = speed > 0 ? load.velocity.map((x) => x / speed) : [1, 0, 0];
          set({ ...load, velocity: along.map((x) => Number((x * next).toPrecision(4))) as Wind['velocity'] });
        }}
      />
      <ChoiceOfFew
        label="Gusts"
        value={place ?? ('' as (typeof GUST_PLACES)[number]['value'])}
        onChange={(value) => {
          const { factor } = GUST_PLACES.find((each) => each.value === value)!;
          set({
            ...load,
            gusts: factor === 1 ? undefined : { factor, seconds: GUST_SECONDS, seed: load.gusts?.seed ?? 1 },
          });
        }}
        options={GUST_PLACES}
      />
      {load.gusts ? (
        <DimensionSlider
          label="A gust takes"
          value={load.gusts.seconds}
          min={0.3}
          max={10}
          step={0.1}
          unit="s"
          format={(v) => figures(v)}
          refuse={(v) => (v > 0 ? null : 'A gust takes some time.')}
          onChange={(v) => set({ ...load, gusts: { ...load.gusts!, seconds: Number(v.toFixed(2)) } })}
        />
      ) : null}
    </>
  );
}

/** A gust factor speaks of the strongest three seconds. */
const GUST_SECONDS = 3;
