import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';
import Svg, { Line, Path, Text as SvgText } from 'react-native-svg';
import { figures } from '../../shared/units';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Text } from '../ui/text';

export interface PlotCurve {
  name: string;
  /** a drawn line of the textbook, or points that were computed */
  kind: 'textbook' | 'here';
  points: readonly (readonly [number, number])[];
}

interface Props {
  /** quantity and unit of each axis */
  x: string;
  y: string;
  curves: readonly PlotCurve[];
  height: number;
}

const LEFT = 52;
const TOP = 26;
const FOOT = 40;
const LABEL_STEP = 16;
/** Shape tells which points are which; colour only that they are ours. */
const MARKS = ['M-4 0a4 4 0 1 0 8 0a4 4 0 1 0 -8 0z', 'M-3.6 -3.6h7.2v7.2h-7.2z', 'M0 -4.6L4.4 3.4H-4.4z'];

/** Computed points over textbook lines, labelled where they end; the same as a table on demand. */
export function XyPlot({ x: xLabel, y: yLabel, curves, height }: Props) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const [table, setTable] = useState(false);
  const right = width < 480 ? 112 : 132;
  const points = curves.flatMap((curve) => curve.points);
  const reach = (k: 0 | 1) => {
    const low = Math.min(0, ...points.map((p) => p[k]));
    const high = Math.max(0, ...points.map((p) => p[k]));
    // Rounding on the far side of zero is no reason for a line more.
    const least = 1e-3 * (high - low);
    return [low > -least ? 0 : low, high < least ? 0 : high];
  };
  const x = scaleLinear(reach(0), [LEFT, Math.max(LEFT + 1, width - right)]);
  const y = scaleLinear(reach(1), [height - FOOT, TOP]).nice(8);
  const ours = curves.filter((curve) => curve.kind === 'here');
  const mark = (curve: PlotCurve) => MARKS[ours.indexOf(curve) % MARKS.length]!;
  const ends = labelled(
    curves.map((curve) => y(curve.points.at(-1)![1])),
    TOP,
    height - FOOT,
  );
  const description = `${yLabel} over ${xLabel}: ${curves
    .map((curve) => `${curve.name} ends at ${figures(curve.points.at(-1)![1])}`)
    .join(', ')}`;
  return (
    <View style={styles.plot}>
      {table ? (
        <PlotTable x={xLabel} curves={curves} />
      ) : (
        <View
          role="img"
          aria-label={description}
          style={{ height }}
          onLayout={(e) => setWidth(e.nativeEvent.layout.width)}
        >
          {width > 0 ? (
            <Svg width={width} height={height}>
              <SvgText x={0} y={12} fontSize={12} fontFamily={SANS} fill={colors.ink2}>
                {yLabel}
              </SvgText>
              {y.ticks(4).map((tick) => (
                <Line key={tick} x1={LEFT} x2={width - right} y1={y(tick)} y2={y(tick)} stroke={colors.hair} />
              ))}
              {y.ticks(4).map((tick) => (
                <SvgText
                  key={`y${tick}`}
                  x={LEFT - 6}
                  y={y(tick) + 4}
                  textAnchor="end"
                  fontSize={12}
                  fontFamily={MONO}
                  fill={colors.ink2}
                >
                  {figures(tick)}
                </SvgText>
              ))}
              <Line x1={LEFT} x2={width - right} y1={height - FOOT} y2={height - FOOT} stroke={colors.edge} />
              {x.ticks(width < 480 ? 4 : 6).map((tick) => (
                <SvgText
                  key={`x${tick}`}
                  x={x(tick)}
                  y={height - FOOT + 16}
                  textAnchor="middle"
                  fontSize={12}
                  fontFamily={MONO}
                  fill={colors.ink2}
                >
                  {figures(tick)}
                </SvgText>
              ))}
              <SvgText
                x={width - right}
                y={height - 6}
                textAnchor="end"
                fontSize={12}
                fontFamily={SANS}
                fill={colors.ink2}
              >
                {xLabel}
              </SvgText>
              {curves.map((curve) =>
                curve.kind === 'textbook' ? (
                  <Path
                    key={curve.name}
                    d={line<readonly [number, number]>((p) => x(p[0]), (p) => y(p[1]))([...curve.points]) ?? ''} // prettier-ignore
                    fill="none"
                    stroke={colors.phantom}
                    strokeWidth={1.4}
                    strokeDasharray="14 3 3 3"
                  />
                ) : (
                  curve.points.map(([px, py]) => (
                    <Path
                      key={`${curve.name}${px}`}
                      d={mark(curve)}
                      transform={`translate(${x(px)}, ${y(py)})`}
                      fill={colors.page}
                      stroke={colors.kelp}
                      strokeWidth={1.6}
                    />
                  ))
                ),
              )}
              {curves.map((curve, k) => (
                <SvgText
                  key={`n${curve.name}`}
                  x={width - right + (curve.kind === 'here' ? 26 : 12)}
                  y={ends[k]! + 4}
                  fontSize={12}
                  fontFamily={SANS}
                  fill={curve.kind === 'here' ? colors.kelp : colors.ink2}
                >
                  {curve.name}
                </SvgText>
              ))}
              {curves.map((curve, k) =>
                curve.kind === 'here' ? (
                  <Path
                    key={`m${curve.name}`}
                    d={mark(curve)}
                    transform={`translate(${width - right + 17}, ${ends[k]})`}
                    fill={colors.page}
                    stroke={colors.kelp}
                    strokeWidth={1.6}
                  />
                ) : null,
              )}
            </Svg>
          ) : null}
        </View>
      )}
      <Button
        kind="quiet"
        label={table ? 'Show as a plot' : 'Show as a table'}
        onPress={() => setTable(!table)}
        style={styles.toggle}
      />
    </View>
  );
}

/** Where the labels go: beside their ends, pushed apart until none covers another. */
function labelled(wanted: readonly number[], top: number, foot: number): number[] {
  const order = wanted.map((_, k) => k).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
  const placed = [...wanted];
  order.forEach((k, i) => {
    if (i > 0) placed[k] = Math.max(placed[k]!, placed[order[i - 1]!]! + LABEL_STEP);
  });
  let limit = foot;
  for (const k of [...order].reverse()) {
    placed[k] = Math.max(top, Math.min(placed[k]!, limit));
    limit = placed[k]! - LABEL_STEP;
  }
  return placed;
}

function PlotTable({ x, curves }: { x: string; curves: readonly PlotCurve[] }) {
  const { colors } = useTheme();
  return (
    <View style={styles.tables}>
      {curves.map((curve) => (
        <View key={curve.name} role="table" aria-label={curve.name} style={styles.table}>
          <View role="row" style={[styles.line, { borderBottomColor: colors.ink }]}>
            <Text variant="note" color="ink2" role="columnheader">
              {x}
            </Text>
            <Text variant="note" color="ink2" role="columnheader">
              {curve.name}
            </Text>
          </View>
          {every(curve.points, 14).map(([px, py]) => (
            <View key={px} role="row" style={[styles.line, { borderBottomColor: colors.hair }]}>
              <Text variant="quantity" role="cell">
                {figures(px)}
              </Text>
              <Text variant="quantity" role="cell">
                {figures(py, 4)}
              </Text>
            </View>
          ))}
        </View>
      ))}
    </View>
  );
}

/** At most about `count` of the points, evenly, first and last among them. */
function every<T>(points: readonly T[], count: number): T[] {
  const step = Math.max(1, Math.ceil((points.length - 1) / (count - 1)));
  return points.filter((_, k) => k % step === 0 || k === points.length - 1);
}

const SANS = "'IBM Plex Sans', sans-serif";
const MONO = "'IBM Plex Mono', monospace";

const styles = StyleSheet.create({
  plot: { gap: 4 },
  toggle: { alignSelf: 'flex-start', marginLeft: -12 },
  tables: { flexDirection: 'row', flexWrap: 'wrap', gap: 24 },
  table: { flexGrow: 1, flexBasis: 200, maxWidth: 320 },
  line: { flexDirection: 'row', justifyContent: 'space-between', gap: 12, borderBottomWidth: 1, paddingVertical: 4 },
});
