import { StyleSheet, View } from 'react-native';
import Svg, { Path } from 'react-native-svg';
import { RADIUS } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

/** A drafted dimension to read: limits at the ticks, the value in the tag that breaks the line at `share` (0…1). */
export function Dimension({
  label,
  note,
  value,
  min,
  max,
  share,
}: {
  label: string;
  note: string;
  value: string;
  min: string;
  max: string;
  share: number;
}) {
  const { colors } = useTheme();
  const width = 9.7 * value.length + 20;
  const left =
    `clamp(0px, calc(${(100 * Math.max(0, Math.min(1, share))).toFixed(2)}% - ${width / 2}px), calc(100% - ${width}px))` as `${number}%`;
  return (
    <View aria-label={`${label}: ${value}, from ${min} to ${max}`} role="img">
      <View style={styles.ends}>
        <Text variant="dense">{label}</Text>
        <Text variant="caption" color="ink2">
          {note}
        </Text>
      </View>
      <View style={styles.body}>
        <View style={[styles.rule, { backgroundColor: colors.edge }]} />
        <View style={[styles.tick, { left: 0, backgroundColor: colors.edge }]} />
        <View style={[styles.tick, { right: 0, backgroundColor: colors.edge }]} />
        <Svg width={10} height={8} style={[styles.arrow, { left: 1 }]}>
          <Path d="M0 4l9 -3.5v7z" fill={colors.edge} />
        </Svg>
        <Svg width={10} height={8} style={[styles.arrow, { right: 1 }]}>
          <Path d="M10 4l-9 -3.5v7z" fill={colors.edge} />
        </Svg>
        <View style={[styles.tag, { left, width, borderColor: colors.kelp, backgroundColor: colors.paper }]}>
          <Text variant="readout">{value}</Text>
        </View>
      </View>
      <View style={styles.ends}>
        <Text variant="small" color="ink2">
          {min}
        </Text>
        <Text variant="small" color="ink2">
          {max}
        </Text>
      </View>
    </View>
  );
}

const styles = StyleSheet.create({
  ends: { flexDirection: 'row', justifyContent: 'space-between', gap: 8 },
  body: { height: 40, justifyContent: 'center' },
  rule: { height: 1, width: '100%' },
  tick: { position: 'absolute', top: 7, width: 1, height: 26 },
  arrow: { position: 'absolute', top: 16 },
  tag: {
    position: 'absolute',
    height: 32,
    borderWidth: 1,
    borderRadius: RADIUS,
    alignItems: 'center',
    justifyContent: 'center',
  },
});
