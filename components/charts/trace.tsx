import { scaleLinear } from 'd3-scale';
import { line } from 'd3-shape';
import { useState } from 'react';
import { StyleSheet, View, type GestureResponderEvent } from 'react-native';
import Svg, { Circle, Line, Path, Text as SvgText } from 'react-native-svg';
import { figures } from '../../shared/units';
import { useTheme } from '../theme/use-theme';
import { Text } from '../ui/text';

export interface Series {
  name: string;
  values: readonly number[];
  /** the right run of a comparison is dashed, whatever its colour */
  kind?: 'ink' | 'left' | 'right';
}

interface Props {
  /** quantity and unit: "G1 sideways, mm" */
  title: string;
  series: readonly Series[];
  height?: number;
  /** sample that is read out; the last one when left out */
  at?: number;
  /** keep zero in the range */
  zero?: boolean;
  /** a dashed line with words */
  threshold?: { value: number; words: string };
  onRead?: (index: number) => void;
}

const LEFT = 46;

/** Values over a common index as lines with direct labels and a readable point. */
export function Trace({ title, series, height = 110, at, zero = true, threshold, onRead }: Props) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const count = Math.max(2, ...series.map((s) => s.values.length));
  let low = zero ? 0 : Infinity;
  let high = zero ? 0 : -Infinity;
  for (const { values } of series) {
    for (const v of values) {
      if (v < low) low = v;
      if (v > high) high = v;
    }
  }
  if (threshold) low = Math.min(low, threshold.value);
  if (!(high > low)) [low, high] = [Number.isFinite(low) ? low - 0.5 : 0, Number.isFinite(low) ? low + 0.5 : 1];
  const y = scaleLinear([low, high], [height - 8, 8]).nice(3);
  const x = scaleLinear([0, count - 1], [LEFT, Math.max(LEFT + 1, width - 6)]);
  const tone = (s: Series) => (s.kind === 'left' ? colors.kelp : s.kind === 'right' ? colors.plum : colors.ink);
  const index = at ?? Math.max(...series.map((s) => s.values.length)) - 1;
  const read = (event: GestureResponderEvent) => {
    const i = Math.round(x.invert(event.nativeEvent.locationX));
    onRead?.(Math.max(0, Math.min(count - 1, i)));
  };
  return (
    <View
      style={styles.trace}
      role="img"
      aria-label={`${title}: ${series.map((s) => `${s.name} ${figures(s.values[index] ?? NaN)}`).join(', ')}`}
    >
      <View style={styles.head}>
        <Text variant="note" color="ink2" numberOfLines={1} style={styles.title}>
          {title}
        </Text>
        {series.map((s) => (
          <Text key={s.name} variant="readout" color={s.kind === 'left' ? 'kelp' : s.kind === 'right' ? 'plum' : 'ink'}>
            {`${series.length > 1 ? `${s.name} ` : ''}${figures(s.values[index] ?? NaN)}`}
          </Text>
        ))}
      </View>
      <View
        style={{ height }}
        onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
        onStartShouldSetResponder={() => onRead !== undefined}
        onMoveShouldSetResponder={() => onRead !== undefined}
        onResponderGrant={read}
        onResponderMove={read}
      >
        {width > 0 ? (
          <Svg width={width} height={height} style={{ pointerEvents: 'none' }}>
            {y.ticks(3).map((tick) => (
              <Line key={tick} x1={LEFT} x2={width} y1={y(tick)} y2={y(tick)} stroke={colors.hair} />
            ))}
            {y.ticks(3).map((tick) => (
              <SvgText
                key={`t${tick}`}
                x={LEFT - 6}
                y={y(tick) + 4}
                textAnchor="end"
                fontSize={12}
                fontFamily="'IBM Plex Mono', monospace"
                fill={colors.ink2}
              >
                {figures(tick)}
              </SvgText>
            ))}
            {threshold ? (
              <>
                <Line
                  x1={LEFT}
                  x2={width}
                  y1={y(threshold.value)}
                  y2={y(threshold.value)}
                  stroke={colors.apricot}
                  strokeDasharray="4 3"
                />
                <SvgText
                  x={width - 4}
                  y={y(threshold.value) - 4}
                  textAnchor="end"
                  fontSize={12}
                  fontFamily="'IBM Plex Sans', sans-serif"
                  fill={colors.apricot}
                >
                  {threshold.words}
                </SvgText>
              </>
            ) : null}
            {series.map((s) => (
              <Path
                key={s.name}
                d={
                  line<number>(
                    (_, i) => x(i),
                    (v) => y(v),
                  )([...s.values]) ?? ''
                }
                fill="none"
                stroke={tone(s)}
                strokeWidth={1.6}
                strokeDasharray={s.kind === 'right' ? '6 4' : undefined}
              />
            ))}
            {series.map((s) =>
              s.values[index] === undefined ? null : (
                <Circle key={`p${s.name}`} cx={x(index)} cy={y(s.values[index]!)} r={3.5} fill={tone(s)} />
              ),
            )}
          </Svg>
        ) : null}
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  trace: { gap: 2, flex: 1, minWidth: 0 },
  head: { flexDirection: 'row', justifyContent: 'space-between', gap: 10, alignItems: 'baseline' },
  title: { flexShrink: 1 },
});
