import { useEffect, useRef, useState } from 'react';
import { StyleSheet, TextInput, View, type GestureResponderEvent } from 'react-native';
import Svg, { Path } from 'react-native-svg';
import { RADIUS, space, type as variants } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { focusRing } from './focus-ring';
import { Text } from './text';

interface Props {
  label: string;
  hint?: string;
  value: number;
  min: number;
  max: number;
  /** smallest change; arrows step by it, Shift by ten of it */
  step: number;
  scale?: 'linear' | 'log';
  unit?: string;
  /** figures shown */
  format: (value: number) => string;
  /** dotted tick: the preset's or last saved value */
  reference?: number;
  /** why a typed value is refused; the last good value stays in force */
  refuse?: (value: number) => string | null;
  onChange: (value: number) => void;
}

/** The drafted dimension as a control: drag the tag, tap it to type, arrows step. */
export function DimensionSlider(props: Props) {
  const {
    label,
    hint,
    value,
    min,
    max,
    step,
    scale = 'linear',
    unit = '',
    format,
    reference,
    refuse,
    onChange,
  } = props;
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const [typing, setTyping] = useState<string | null>(null);
  const [refused, setRefused] = useState<string | null>(null);
  const line = useRef<View>(null);
  const share = (v: number) => {
    const t = scale === 'log' ? Math.log(v / min) / Math.log(max / min) : (v - min) / (max - min);
    return Math.max(0, Math.min(1, t));
  };
  const snap = (v: number) =>
    Math.max(min, Math.min(max, scale === 'log' ? Number(v.toPrecision(3)) : Math.round(v / step) * step));
  const atShare = (t: number) => snap(scale === 'log' ? min * (max / min) ** t : min + t * (max - min));
  const drag = (event: GestureResponderEvent) => {
    const t = Math.max(0, Math.min(1, event.nativeEvent.locationX / Math.max(1, width)));
    setRefused(null);
    onChange(atShare(t));
  };
  const nudge = (steps: number) => {
    setRefused(null);
    onChange(scale === 'log' ? snap(value * 1.05 ** steps) : snap(value + steps * step));
  };
  useKeys(line, nudge);
  const commit = () => {
    if (typing === null) return;
    const typed = Number(typing.replace(',', '.'));
    const why =
      !Number.isFinite(typed) || typing.trim() === ''
        ? 'Give a number.'
        : (refuse?.(typed) ?? outside(typed, min, max, unit, format));
    setRefused(why);
    if (!why) onChange(typed);
    setTyping(null);
  };
  const tagWidth = Math.max(64, 9.7 * (format(value).length + unit.length + 1) + 20);
  // Placed by the browser, so that it stands right in the first picture, before anything was measured.
  const left =
    `clamp(0px, calc(${(100 * share(value)).toFixed(2)}% - ${tagWidth / 2}px), calc(100% - ${tagWidth}px))` as `${number}%`;
  const edge = refused ? colors.apricot : colors.kelp;
  return (
    <View style={styles.slider}>
      <View style={styles.head}>
        <Text variant="dense">{label}</Text>
        {hint ? (
          <Text variant="caption" color="ink2">
            {hint}
          </Text>
        ) : null}
      </View>
      <View style={styles.body} onLayout={(event) => setWidth(event.nativeEvent.layout.width)}>
        <View
          ref={line}
          role="slider"
          aria-label={label}
          aria-valuemin={min}
          aria-valuemax={max}
          aria-valuenow={value}
          aria-valuetext={`${format(value)} ${unit}`.trim()}
          tabIndex={0}
          style={styles.line}
          onStartShouldSetResponder={() => true}
          onMoveShouldSetResponder={() => true}
          onResponderTerminationRequest={() => false}
          onResponderGrant={drag}
          onResponderMove={drag}
        >
          <View style={[styles.rule, { backgroundColor: colors.edge }]} />
          <View style={[styles.tick, { left: 0, backgroundColor: colors.edge }]} />
          <View style={[styles.tick, { right: 0, backgroundColor: colors.edge }]} />
          <Svg width={10} height={8} style={[styles.arrow, { left: 1 }]}>
            <Path d="M0 4l9 -3.5v7z" fill={colors.edge} />
          </Svg>
          <Svg width={10} height={8} style={[styles.arrow, { right: 1 }]}>
            <Path d="M10 4l-9 -3.5v7z" fill={colors.edge} />
          </Svg>
          {reference !== undefined ? (
            <View style={[styles.reference, { left: `${100 * share(reference)}%`, borderColor: colors.ink2 }]} />
          ) : null}
        </View>
        <View
          style={[
            styles.tag,
            { left, width: tagWidth, borderColor: edge, backgroundColor: colors.paper },
            typing !== null && focusRing(colors.ink),
          ]}
          pointerEvents="box-none"
        >
          <TextInput
            aria-label={`${label}, typed${unit ? `, ${unit}` : ''}`}
            value={typing ?? format(value)}
            selectTextOnFocus
            onFocus={() => setTyping(format(value))}
            onChangeText={setTyping}
            onBlur={commit}
            onSubmitEditing={commit}
            inputMode="decimal"
            style={[
              variants.readout,
              styles.tagText,
              {
                color: refused ? colors.apricot : colors.ink,
                width: unit ? 9.7 * (typing ?? format(value)).length + 6 : '100%',
              },
            ]}
          />
          {unit ? (
            <Text variant="readout" color={refused ? 'apricot' : 'ink'} numberOfLines={1} style={styles.unit}>
              {unit}
            </Text>
          ) : null}
        </View>
      </View>
      <View style={styles.head}>
        <Text variant="small" color="ink2">
          {format(min)}
        </Text>
        <Text variant="small" color="ink2">
          {`${format(max)} ${unit}`.trim()}
        </Text>
      </View>
      {refused ? (
        <Text variant="note" color="apricot" role="alert">
          {refused}
        </Text>
      ) : null}
    </View>
  );
}

function outside(v: number, min: number, max: number, unit: string, format: (v: number) => string): string | null {
  return v < min || v > max ? `Give a value from ${format(min)} to ${format(max)} ${unit}`.trim() + '.' : null;
}

/** Arrow keys on the line; the event is the browser's own, as react-native-web passes none on for views. */
function useKeys(line: React.RefObject<View | null>, nudge: (steps: number) => void): void {
  const latest = useRef(nudge);
  useEffect(() => {
    latest.current = nudge;
  });
  useEffect(() => {
    const element = line.current as unknown as HTMLElement | null;
    if (!element?.addEventListener) return;
    const onKey = (event: KeyboardEvent) => {
      const direction = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
      if (!direction) return;
      event.preventDefault();
      latest.current(direction * (event.shiftKey ? 10 : 1));
    };
    element.addEventListener('keydown', onKey);
    return () => element.removeEventListener('keydown', onKey);
  }, [line]);
}

const styles = StyleSheet.create({
  slider: { paddingVertical: space.xs },
  head: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline', gap: space.s },
  body: { height: 44, justifyContent: 'center' },
  line: { height: 44, justifyContent: 'center', cursor: 'pointer', userSelect: 'none' },
  rule: { height: 1, width: '100%' },
  tick: { position: 'absolute', top: 9, width: 1, height: 26 },
  arrow: { position: 'absolute', top: 18, pointerEvents: 'none' },
  reference: { position: 'absolute', top: 13, height: 18, borderLeftWidth: 2, borderStyle: 'dotted' },
  tag: {
    position: 'absolute',
    height: 34,
    borderWidth: 1,
    borderRadius: RADIUS,
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'center',
    overflow: 'hidden',
  },
  unit: { pointerEvents: 'none' },
  tagText: { textAlign: 'center', height: 32, outlineWidth: 0 },
});
