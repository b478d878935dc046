import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, fromLength, toLength, type LengthUnit } from '../../shared/units';
import { GRAVITY } from '../../shared/words';
import type { Ready } from '../../solver/index';
import { Button } from '../ui/button';
import { Card } from '../ui/card';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { DimensionSlider } from '../ui/dimension-slider';
import { Row } from '../ui/row';
import { Text } from '../ui/text';
import { freeId, type Edit } from './edit';
import { LoadEditor } from './load-editor';
import { ObstacleEditor } from './obstacle-editor';
import { regionWords } from './region-words';

interface Props {
  document: SceneDocument;
  edit: Edit;
  ready: Ready | null;
  unit: LengthUnit;
  /** the support or load whose region is being picked on the body */
  picking: string | null;
  onPick: (id: string | null) => void;
}

/** What holds the body, what pushes it, what it can land on. */
export function HoldsCard({ document, edit, ready, unit, picking, onPick }: Props) {
  const { supports, loads, obstacles } = document;
  const up = document.up === 'y' ? 1 : 2;
  const gravity = loads.find((load) => load.kind === 'gravity');
  const bounds = ready?.report.bounds;
  const base = bounds ? bounds.min[up]! : 0;
  const height = bounds ? bounds.max[up]! - base : 1;
  const ground = obstacles.find((obstacle) => obstacle.kind === 'ground');
  const solids = obstacles.filter((obstacle) => obstacle.kind !== 'ground');
  const reach = ready?.report.diagonal ?? 1;
  const addBase = () => {
    if (!bounds) return;
    const pad = 0.01 * ready.report.diagonal;
    const max = bounds.max.map((x) => x + pad) as [number, number, number];
    max[up] = base + 0.06 * height;
    edit('support-add', (d) => ({
      ...d,
      supports: [
        ...d.supports,
        {
          id: freeId('S', d.supports),
          name: 'Base',
          region: { kind: 'box', min: bounds.min.map((x) => x - pad) as [number, number, number], max },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
      ],
    }));
  };
  /** All of the surface within a fiftieth of the body's length of the plane at one end along x. */
  const addEnd = (side: 'left' | 'right') => {
    if (!bounds) return;
    const x = side === 'left' ? bounds.min[0] : bounds.max[0];
    edit('support-add', (d) => ({
      ...d,
      supports: [
        ...d.supports,
        {
          id: freeId('S', d.supports),
          name: side === 'left' ? 'Left end' : 'Right end',
          region: {
            kind: 'plane',
            point: [x, (bounds.min[1] + bounds.max[1]) / 2, (bounds.min[2] + bounds.max[2]) / 2],
            normal: [1, 0, 0],
            tolerance: (bounds.max[0] - bounds.min[0]) / 50,
          },
          axes: ['x', 'y', 'z'],
          keys: [],
        },
      ],
    }));
  };
  return (
    <Card title="Supports and loads" summary={`${supports.length} held, ${loads.length} pushing`}>
      {supports.map((support) => (
        <SupportEditor
          key={support.id}
          support={support}
          edit={edit}
          unit={unit}
          height={height}
          picking={picking === support.id}
          onPick={(on) => onPick(on ? support.id : null)}
        />
      ))}
      {supports.length === 0 ? (
        <Text color="ink2">Nothing holds the body. It falls until it meets a ground.</Text>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: 8 }}>
        <Button label="Hold the base" onPress={addBase} />
        <Button label="Hold the left end" onPress={() => addEnd('left')} />
        <Button label="Hold the right end" onPress={() => addEnd('right')} />
        <Button
          label="Hold by touch"
          onPress={() => {
            const id = freeId('S', supports);
            edit('support-add', (d) => ({
              ...d,
              supports: [
                ...d.supports,
                { id, name: 'Picked', region: { kind: 'patches', patches: [0] }, axes: ['x', 'y', 'z'], keys: [] },
              ],
            }));
            onPick(id);
          }}
        />
      </View>
      <Row
        title="Gravity"
        value={gravity?.kind === 'gravity' ? `${figures(Math.hypot(...gravity.acceleration))} m/s²` : 'off'}
        state={
          <Button
            kind="quiet"
            label={gravity ? 'Switch off' : 'Switch on'}
            hint="Gravity"
            onPress={() =>
              edit('gravity', (d) => ({
                ...d,
                loads: gravity
                  ? d.loads.filter((load) => load.kind !== 'gravity')
                  : [
                      ...d.loads,
                      {
                        id: freeId('L', d.loads),
                        name: 'Gravity',
                        kind: 'gravity',
                        acceleration: up === 1 ? [0, -GRAVITY, 0] : [0, 0, -GRAVITY],
                      },
                    ],
              }))
            }
          />
        }
      />
      {loads
        .filter((load) => load.kind !== 'gravity')
        .map((load) => (
          <LoadEditor
            key={load.id}
            load={load}
            edit={edit}
            unit={unit}
            picking={picking === load.id}
            onPick={(on) => onPick(on ? load.id : null)}
          />
        ))}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: 8 }}>
        <Button
          label="Push"
          hint="Add a push on patches picked by touch"
          onPress={() => {
            const id = freeId('L', loads);
            const weight = (ready?.mass ?? 1) * GRAVITY;
            edit('load-add', (d) => ({
              ...d,
              loads: [
                ...d.loads,
                {
                  id,
                  name: 'Push',
                  kind: 'push',
                  region: { kind: 'patches', patches: [0] },
                  force: [Number((0.2 * weight).toPrecision(2)), 0, 0],
                  from: 0,
                  until: null,
                },
              ],
            }));
            onPick(id);
          }}
        />
        <Button
          label="Twist"
          hint="Add a twist on patches picked by touch"
          onPress={() => {
            const id = freeId('L', loads);
            const moment = 0.05 * (ready?.mass ?? 1) * GRAVITY * (ready?.report.diagonal ?? 1);
            edit('load-add', (d) => ({
              ...d,
              loads: [
                ...d.loads,
                {
                  id,
                  name: 'Twist',
                  kind: 'twist',
                  region: { kind: 'patches', patches: [0] },
                  axis: up === 1 ? [0, 1, 0] : [0, 0, 1],
                  moment: Number(moment.toPrecision(2)),
                  from: 0,
                  until: null,
                },
              ],
            }));
            onPick(id);
          }}
        />
        <Button
          label="Wind"
          hint="Add wind"
          disabledReason={loads.some((load) => load.kind === 'wind') ? 'One wind is blowing.' : null}
          onPress={() =>
            edit('load-add', (d) => ({
              ...d,
              loads: [
                ...d.loads,
                {
                  id: freeId('L', d.loads),
                  name: 'Wind',
                  kind: 'wind',
                  velocity: [4.34, 0, 0],
                  dragCoefficient: 1.2,
                  airDensity: 1.225,
                },
              ],
            }))
          }
        />
      </View>
      <Row
        title="Ground"
        note={ground ? 'catches the body, with friction' : 'nothing below'}
        value={ground ? `${figures(toLength(ground.height, unit))} ${unit}` : 'off'}
        state={
          <Button
            kind="quiet"
            label={ground ? 'Take away' : 'Put under'}
            hint="Ground"
            onPress={() =>
              edit('ground', (d) => ({
                ...d,
                obstacles: ground
                  ? solids
                  : [
                      ...solids,
                      {
                        id: freeId('O', d.obstacles),
                        name: 'Ground',
                        kind: 'ground',
                        height: Number((base - 0.3 * height).toPrecision(4)),
                        friction: 0.5,
                      },
                    ],
              }))
            }
          />
        }
      />
      {ground ? (
        <>
          <DimensionSlider
            label="Height of the ground"
            value={toLength(ground.height, unit)}
            min={toLength(base - 3 * height, unit)}
            max={toLength(base, unit)}
            step={toLength(height / 100, unit)}
            unit={unit}
            format={(v) => figures(v)}
            onChange={(v) =>
              edit('ground-height', (d) => ({
                ...d,
                obstacles: [...solids, { ...ground, height: fromLength(v, unit) }],
              }))
            }
          />
          <DimensionSlider
            label="Friction"
            value={ground.friction}
            min={0}
            max={1.5}
            step={0.05}
            format={(v) => v.toFixed(2)}
            onChange={(v) =>
              edit('ground-friction', (d) => ({
                ...d,
                obstacles: [...solids, { ...ground, friction: Number(v.toFixed(3)) }],
              }))
            }
          />
        </>
      ) : null}
      {solids.map((obstacle) => (
        <ObstacleEditor key={obstacle.id} obstacle={obstacle} edit={edit} unit={unit} reach={reach} />
      ))}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: 8 }}>
        <Button
          label="Sphere"
          hint="Add a sphere to hit"
          disabledReason={bounds ? null : 'The body is being prepared.'}
          onPress={() =>
            edit('obstacle-add', (d) => ({ ...d, obstacles: [...d.obstacles, sphereUnder(d, bounds!, up)] }))
          }
        />
        <Button
          label="Box"
          hint="Add a box to hit"
          disabledReason={bounds ? null : 'The body is being prepared.'}
          onPress={() => edit('obstacle-add', (d) => ({ ...d, obstacles: [...d.obstacles, boxUnder(d, bounds!, up)] }))}
        />
      </View>
    </Card>
  );
}

type Bounds = Ready['report']['bounds'];
type Vec3 = [number, number, number];
const tidy = (x: number) => Number(x.toPrecision(4));

/** A ball of a third of the body's width, a little below its middle. */
function sphereUnder(d: SceneDocument, { min, max }: Bounds, up: 1 | 2): SceneDocument['obstacles'][number] {
  const side = up === 1 ? 2 : 1;
  const radius = tidy(Math.min(max[0] - min[0], max[side]! - min[side]!) / 6);
  const centre = min.map((x, k) => tidy(k === up ? x - 1.5 * radius : (x + max[k]!) / 2)) as Vec3;
  return { id: freeId('O', d.obstacles), name: 'Sphere', kind: 'sphere', centre, radius, friction: 0.5 };
}

/** A step under one half of the body, a little below it. */
function boxUnder(d: SceneDocument, { min, max }: Bounds, up: 1 | 2): SceneDocument['obstacles'][number] {
  const height = 0.3 * (max[up]! - min[up]!);
  const low = min.map((x, k) => tidy(k === up ? x - 1.2 * height : x)) as Vec3;
  const high = max.map((x, k) =>
    tidy(k === up ? min[up]! - 0.2 * height : k === 0 ? (min[0] + max[0]) / 2 : x),
  ) as Vec3;
  return { id: freeId('O', d.obstacles), name: 'Box', kind: 'box', min: low, max: high, friction: 0.5 };
}

type Support = SceneDocument['supports'][number];
const AXES = ['x', 'y', 'z'] as const;

function SupportEditor({
  support,
  edit,
  unit,
  height,
  picking,
  onPick,
}: {
  support: Support;
  edit: Edit;
  unit: LengthUnit;
  height: number;
  picking: boolean;
  onPick: (on: boolean) => void;
}) {
  const set = (kind: string, change: Partial<Support>) =>
    edit(`support-${kind}-${support.id}`, (d) => ({
      ...d,
      supports: d.supports.map((s) => (s.id === support.id ? { ...s, ...change } : s)),
    }));
  const carried = support.keys.length > 0;
  const sway = Math.max(0, ...support.keys.map((key) => Math.abs(key.translation[0])));
  return (
    <View style={{ gap: 6 }}>
      <Row
        title={`${support.id} ${support.name}`}
        note={`${regionWords(support.region, unit)}, ${carried ? `carried along a path, ${support.keys.length} keys` : 'fixed'}`}
        state={
          <Button
            kind="quiet"
            label="Let go"
            hint={`Remove support ${support.id}`}
            onPress={() =>
              edit('support-remove', (d) => ({ ...d, supports: d.supports.filter((s) => s.id !== support.id) }))
            }
          />
        }
      />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: 8 }}>
        {AXES.map((axis) => (
          <Button
            key={axis}
            label={`Hold ${axis}`}
            pressed={support.axes.includes(axis)}
            onPress={() => {
              const axes = support.axes.includes(axis)
                ? support.axes.filter((a) => a !== axis)
                : [...support.axes, axis];
              if (axes.length > 0) set('axes', { axes });
            }}
          />
        ))}
        <Button
          label={picking ? 'Done picking' : 'Pick on the body'}
          hint={`Region of ${support.id}`}
          pressed={picking}
          onPress={() => onPick(!picking)}
        />
      </View>
      <ChoiceOfFew
        label={`How ${support.id} holds`}
        value={carried ? 'carried' : 'fixed'}
        onChange={(value) => set('carry', { keys: value === 'fixed' ? [] : swayKeys(0.15 * height) })}
        options={[
          { value: 'fixed', label: 'Fixed' },
          { value: 'carried', label: 'Carried to and fro' },
        ]}
      />
      {carried ? (
        <DimensionSlider
          label="Reach to each side"
          value={toLength(sway, unit)}
          min={0}
          max={toLength(Math.max(height, sway), unit)}
          step={toLength(height / 100, unit)}
          unit={unit}
          format={(v) => figures(v)}
          onChange={(v) => set('reach', { keys: swayKeys(fromLength(v, unit)) })}
        />
      ) : null}
    </View>
  );
}

/** One swing to the right, one to the left and back to rest, within a second. */
const swayKeys = (reach: number): Support['keys'] =>
  [0, reach, -reach, 0].map((x, k) => ({
    time: [0, 0.25, 0.6, 0.85][k]!,
    translation: [x, 0, 0],
    rotationDegrees: [0, 0, 0],
  }));
