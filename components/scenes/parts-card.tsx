import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, fromLength, lengthText, toLength, type LengthUnit } from '../../shared/units';
import type { Ready } from '../../solver/index';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Card } from '../ui/card';
import { DimensionSlider } from '../ui/dimension-slider';
import { Fact } from '../ui/fact';
import { Text } from '../ui/text';
import { convergenceCost } from './convergence-cost';
import { ConvergenceReadout } from './convergence-readout';
import type { Edit } from './edit';
import type { Convergence } from './use-convergence';

/** How many parts the body moves on, and what that costs. */
export function PartsCard({
  document,
  edit,
  ready,
  rate,
  unit,
  convergence,
}: {
  document: SceneDocument;
  edit: Edit;
  ready: Ready | null;
  rate: number | null;
  unit: LengthUnit;
  convergence: Convergence;
}) {
  const now = ready?.partCount ?? document.parts.count;
  // Work per step grows about with the square of the part count (active sets stay, the factor fills).
  const forecast = rate === null || now === document.parts.count ? null : rate * (now / document.parts.count) ** 2;
  const diagonal = ready?.report.diagonal ?? 1;
  return (
    <Card title="Parts" summary={`${now} now`}>
      <DimensionSlider
        label="Part count"
        hint="the pose is kept"
        value={document.parts.count}
        min={1}
        max={80}
        step={1}
        format={(v) => String(Math.round(v))}
        refuse={(v) => (Number.isInteger(v) && v >= 1 ? null : 'Give a whole number from 1.')}
        onChange={(count) => edit('part-count', (d) => ({ ...d, parts: { ...d.parts, count: Math.round(count) } }))}
      />
      <Fact name="Speed now" value={rate === null ? 'paused' : `${figures(rate)} steps/s`} />
      {forecast !== null ? (
        <Fact name={`Forecast at ${document.parts.count} parts`} value={`about ${figures(forecast, 2)} steps/s`} />
      ) : null}
      <ConvergenceReadout
        convergence={convergence}
        seconds={
          ready && convergenceCost(document, { setUpSeconds: ready.report.seconds, partCount: ready.partCount, rate })
        }
      />
      <ChoiceOfFew
        label="Detail of a part"
        value={document.parts.order}
        onChange={(order) => edit('part-order', (d) => ({ ...d, parts: { ...d.parts, order } }))}
        options={[
          { value: 'quadratic', label: 'Bends (quadratic)' },
          { value: 'linear', label: 'Draft (linear)' },
        ]}
      />
      <DimensionSlider
        label="Bond distance"
        hint="joins pieces closer than this"
        value={toLength(document.bondDistance, unit)}
        min={0}
        max={toLength(Math.max(0.05 * diagonal, document.bondDistance), unit)}
        step={toLength(0.0005 * diagonal, unit)}
        unit={unit}
        format={(v) => figures(v, 2)}
        onChange={(v) => edit('bond', (d) => ({ ...d, bondDistance: fromLength(v, unit) }))}
      />
      {ready ? (
        <View style={{ gap: 4 }}>
          <Fact
            name="Pieces"
            value={String(ready.bodies.length)}
            note={ready.bodies.map((b) => `${b.partCount} part${b.partCount === 1 ? '' : 's'}`).join(', ')}
          />
          <Fact name="Diagonal" value={lengthText(diagonal, unit)} />
          {ready.report.remarks.map((remark) => (
            <Text key={remark} variant="note" color="ink2">
              {remark}
            </Text>
          ))}
        </View>
      ) : null}
    </Card>
  );
}
