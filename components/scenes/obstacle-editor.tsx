import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, fromLength, lengthText, toLength, type LengthUnit } from '../../shared/units';
import { Button } from '../ui/button';
import { DimensionSlider } from '../ui/dimension-slider';
import { Row } from '../ui/row';
import type { Edit } from './edit';

type Obstacle = SceneDocument['obstacles'][number];
type Vec3 = [number, number, number];
const AXES = ['x', 'y', 'z'] as const;

/** A sphere or box to land on or hit, in numbers; its place by its middle. */
export function ObstacleEditor({
  obstacle,
  edit,
  unit,
  reach,
}: {
  obstacle: Extract<Obstacle, { kind: 'sphere' | 'box' }>;
  edit: Edit;
  unit: LengthUnit;
  /** m, the body's diagonal */
  reach: number;
}) {
  const set = (kind: string, next: Obstacle) =>
    edit(`obstacle-${kind}-${obstacle.id}`, (d) => ({
      ...d,
      obstacles: d.obstacles.map((each) => (each.id === obstacle.id ? next : each)),
    }));
  const middle: Vec3 =
    obstacle.kind === 'sphere'
      ? obstacle.centre
      : (AXES.map((_, d) => (obstacle.min[d]! + obstacle.max[d]!) / 2) as Vec3);
  const round = (x: number) => Number(x.toPrecision(5));
  const moveTo = (next: Vec3): Obstacle => {
    if (obstacle.kind === 'sphere') return { ...obstacle, centre: next };
    const by = next.map((x, d) => x - middle[d]!);
    return {
      ...obstacle,
      min: obstacle.min.map((x, d) => round(x + by[d]!)) as Vec3,
      max: obstacle.max.map((x, d) => round(x + by[d]!)) as Vec3,
    };
  };
  const length = (label: string, value: number, limits: [number, number], onChange: (metres: number) => void) => (
    <DimensionSlider
      key={label}
      label={label}
      value={toLength(value, unit)}
      min={toLength(Math.min(limits[0], value), unit)}
      max={toLength(Math.max(limits[1], value), unit)}
      step={toLength(reach / 200, unit)}
      unit={unit}
      format={(v) => figures(v)}
      onChange={(v) => onChange(round(fromLength(v, unit)))}
    />
  );
  return (
    <View style={{ gap: 6 }}>
      <Row
        title={`${obstacle.id} ${obstacle.name}`}
        note="stands still"
        value={
          obstacle.kind === 'sphere'
            ? `${lengthText(2 * obstacle.radius, unit)} across`
            : AXES.map((_, d) => figures(toLength(obstacle.max[d]! - obstacle.min[d]!, unit))).join(' × ') + ` ${unit}`
        }
        state={
          <Button
            kind="quiet"
            label="Take away"
            hint={`Obstacle ${obstacle.id}`}
            onPress={() =>
              edit('obstacle-remove', (d) => ({ ...d, obstacles: d.obstacles.filter(({ id }) => id !== obstacle.id) }))
            }
          />
        }
      />
      {AXES.map((axis, d) =>
        length(`Middle, ${axis}`, middle[d]!, [middle[d]! - 2 * reach, middle[d]! + 2 * reach], (value) =>
          set(`middle-${axis}`, moveTo(middle.map((x, k) => (k === d ? value : x)) as Vec3)),
        ),
      )}
      {obstacle.kind === 'sphere'
        ? length('Radius', obstacle.radius, [reach / 100, reach], (radius) =>
            radius > 0 ? set('radius', { ...obstacle, radius }) : undefined,
          )
        : AXES.map((axis, d) =>
            length(`Size along ${axis}`, obstacle.max[d]! - obstacle.min[d]!, [reach / 100, 2 * reach], (size) => {
              if (!(size > 0)) return;
              const change = (end: Vec3, sign: number) =>
                end.map((x, k) => (k === d ? round(middle[d]! + (sign * size) / 2) : x)) as Vec3;
              set(`size-${axis}`, { ...obstacle, min: change(obstacle.min, -1), max: change(obstacle.max, 1) });
            }),
          )}
      <DimensionSlider
        label={`Friction of ${obstacle.id}`}
        value={obstacle.friction}
        min={0}
        max={1.5}
        step={0.05}
        format={(v) => v.toFixed(2)}
        onChange={(v) => set('friction', { ...obstacle, friction: Number(v.toFixed(3)) })}
      />
    </View>
  );
}
