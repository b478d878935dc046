import { useState } from 'react';
import { StyleSheet, View, type GestureResponderEvent } from 'react-native';
import Svg, { Line, Path, Rect, Text as SvgText } from 'react-native-svg';
import { useTheme } from '../theme/use-theme';
import type { Series } from '../charts/trace';
import { Text } from '../ui/text';

interface Props {
  frames: number;
  frame: number;
  /** how many poses have arrived, for the dotted rest */
  arrived: number;
  series: readonly Series[];
  title: string;
  unit: string;
  onFrame: (frame: number) => void;
}

const EDGE = 16;
const TRACE = 54;
const RULE = 46;
const MONO = "'IBM Plex Mono', monospace";

/** The gauge trace above a graduated rule, with a plumb line at the frame: drag anywhere on it. */
export function FrameRule({ frames, frame, arrived, series, title, unit, onFrame }: Props) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const x = (f: number) => EDGE + (f / Math.max(1, frames)) * (width - 2 * EDGE);
  let reach = 0;
  for (const { values } of series) for (const v of values) reach = Math.max(reach, Math.abs(v));
  const y = (v: number) => 6 + (1 - v / (reach || 1)) * (TRACE - 12);
  const drag = (event: GestureResponderEvent) =>
    onFrame(Math.round(((event.nativeEvent.locationX - EDGE) / Math.max(1, width - 2 * EDGE)) * frames));
  const minor = frames <= 120 ? 1 : frames <= 480 ? 6 : 24;
  const major = [12, 24, 48, 96, 240, 480, 960].find((m) => (width * m) / Math.max(1, frames) > 56) ?? 960;
  const ticks = [];
  for (let f = 0; f <= frames; f += minor) ticks.push(f);
  const tag = `f ${frame}`;
  const tagWidth = 10 * tag.length + 12;
  const tagLeft = Math.max(0, Math.min(width - tagWidth, x(frame) - tagWidth / 2));
  return (
    <View style={styles.rule}>
      <View style={styles.head}>
        <Text variant="note" color="ink2" numberOfLines={1}>
          {title}
        </Text>
        <View style={styles.readings}>
          {series.map((s) => (
            <Text
              key={s.name}
              variant="quantity"
              color={s.kind === 'right' ? 'plum' : s.kind === 'left' ? 'kelp' : 'ink'}
            >
              {`${series.length > 1 ? `${s.name} ` : ''}${s.values[frame] === undefined ? '–' : s.values[frame]!.toFixed(1)} ${unit}`}
            </Text>
          ))}
        </View>
      </View>
      <View
        role="slider"
        aria-label="Frame"
        aria-valuemin={0}
        aria-valuemax={frames}
        aria-valuenow={frame}
        aria-valuetext={`frame ${frame} of ${frames}`}
        tabIndex={0}
        style={styles.touch}
        onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
        onStartShouldSetResponder={() => true}
        onMoveShouldSetResponder={() => true}
        onResponderTerminationRequest={() => false}
        onResponderGrant={drag}
        onResponderMove={drag}
      >
        {width > 0 ? (
          <Svg width={width} height={TRACE + RULE} style={{ pointerEvents: 'none' }}>
            {series.map((s) => (
              <Path
                key={s.name}
                d={s.values.map((v, k) => `${k === 0 ? 'M' : 'L'}${x(k).toFixed(1)} ${y(v).toFixed(1)}`).join('')}
                fill="none"
                stroke={s.kind === 'right' ? colors.plum : s.kind === 'left' ? colors.kelp : colors.ink}
                strokeWidth={1.6}
                strokeDasharray={s.kind === 'right' ? '6 4' : undefined}
              />
            ))}
            <Line x1={EDGE} x2={x(Math.min(frames, arrived))} y1={TRACE} y2={TRACE} stroke={colors.edge} />
            <Line
              x1={x(Math.min(frames, arrived))}
              x2={width - EDGE}
              y1={TRACE}
              y2={TRACE}
              stroke={colors.edge}
              strokeDasharray="2 4"
            />
            {ticks.map((f) => (
              <Line
                key={f}
                x1={x(f)}
                x2={x(f)}
                y1={TRACE}
                y2={TRACE + (f % major === 0 ? 12 : 6)}
                stroke={colors.edge}
              />
            ))}
            {ticks
              .filter((f) => f % major === 0)
              .map((f) => (
                <SvgText
                  key={`n${f}`}
                  x={x(f)}
                  y={TRACE + 28}
                  textAnchor="middle"
                  fontFamily={MONO}
                  fontSize={12}
                  fill={colors.ink2}
                >
                  {f}
                </SvgText>
              ))}
            <Line x1={x(frame)} x2={x(frame)} y1={0} y2={TRACE + 8} stroke={colors.kelp} strokeWidth={2.5} />
            <Rect x={tagLeft} y={TRACE + 8} width={tagWidth} height={24} fill={colors.kelp} />
            <SvgText
              x={tagLeft + tagWidth / 2}
              y={TRACE + 25}
              textAnchor="middle"
              fontFamily={MONO}
              fontSize={14}
              fontWeight="500"
              fill={colors.onKelp}
            >
              {tag}
            </SvgText>
          </Svg>
        ) : null}
      </View>
    </View>
  );
}

/** Ten frames to each side at a size a thumb can step: drag the rule under the plumb line. */
export function CloseUp({
  frames,
  frame,
  onFrame,
}: {
  frames: number;
  frame: number;
  onFrame: (frame: number) => void;
}) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const [from, setFrom] = useState<{ x: number; frame: number } | null>(null);
  const step = width / 21;
  const shown = [];
  for (let f = Math.max(0, frame - 10); f <= Math.min(frames, frame + 10); f++) shown.push(f);
  const x = (f: number) => width / 2 + (f - frame) * step;
  return (
    <View
      aria-label="Close-up of the frames"
      style={styles.close}
      onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
      onStartShouldSetResponder={() => true}
      onMoveShouldSetResponder={() => true}
      onResponderTerminationRequest={() => false}
      onResponderGrant={(event) => setFrom({ x: event.nativeEvent.pageX, frame })}
      onResponderMove={(event) => from && onFrame(Math.round(from.frame - (event.nativeEvent.pageX - from.x) / step))}
      onResponderRelease={() => setFrom(null)}
    >
      <Text variant="caption" color="ink2">
        close-up, drag to step
      </Text>
      {width > 0 ? (
        <Svg width={width} height={44} style={{ pointerEvents: 'none' }}>
          <Line x1={0} x2={width} y1={10} y2={10} stroke={colors.edge} />
          {shown.map((f) => (
            <Line key={f} x1={x(f)} x2={x(f)} y1={10} y2={f % 6 === 0 ? 24 : 17} stroke={colors.edge} />
          ))}
          {shown
            .filter((f) => f % 6 === 0 && Math.abs(f - frame) > 1)
            .map((f) => (
              <SvgText
                key={`n${f}`}
                x={x(f)}
                y={39}
                textAnchor="middle"
                fontFamily={MONO}
                fontSize={12}
                fill={colors.ink2}
              >
                {f}
              </SvgText>
            ))}
          <Line x1={width / 2} x2={width / 2} y1={0} y2={24} stroke={colors.kelp} strokeWidth={2.5} />
          <SvgText
            x={width / 2}
            y={40}
            textAnchor="middle"
            fontFamily={MONO}
            fontSize={13}
            fontWeight="500"
            fill={colors.ink}
          >
            {frame}
          </SvgText>
        </Svg>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  rule: { gap: 2 },
  head: { flexDirection: 'row', justifyContent: 'space-between', gap: 12, paddingHorizontal: EDGE },
  readings: { flexDirection: 'row', gap: 12 },
  touch: { height: TRACE + RULE, cursor: 'pointer', userSelect: 'none' },
  close: { height: 62, marginHorizontal: EDGE, cursor: 'pointer', userSelect: 'none' },
});
