import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, type LengthUnit } from '../../shared/units';
import { Button } from '../ui/button';
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
        note={'region' in load ? regionWords(load.region, unit) : 'on the windward side'}
        value={
          vector
            ? `${figures(Math.hypot(...vector))} ${quantity}`
            : load.kind === 'pressure'
              ? `${figures(load.pressure)} Pa`
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
