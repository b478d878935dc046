import { useState } from 'react';
import { StyleSheet, View } from 'react-native';
import Svg, { Line, Path } from 'react-native-svg';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Button } from './button';
import { Text } from './text';

/** Long work as a dimension line: what is done left, what remains right, and always a way to stop. */
export function Progress({
  label,
  share,
  left,
  right,
  stop,
}: {
  label: string;
  share: number;
  left: string;
  right: string;
  stop?: { label: string; onPress: () => void };
}) {
  const { colors } = useTheme();
  const [width, setWidth] = useState(0);
  const x = Math.max(2, Math.min(1, share) * (width - 2));
  return (
    <View style={styles.progress}>
      <View
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={Math.round(share * 100)}
        onLayout={(event) => setWidth(event.nativeEvent.layout.width)}
        style={styles.line}
      >
        {width > 0 ? (
          <Svg width={width} height={20}>
            <Line x1={0.5} x2={0.5} y1={2} y2={18} stroke={colors.edge} />
            <Line x1={width - 0.5} x2={width - 0.5} y1={2} y2={18} stroke={colors.edge} />
            <Line x1={x} x2={width} y1={10} y2={10} stroke={colors.edge} strokeDasharray="2 4" />
            <Line x1={1} x2={x} y1={10} y2={10} stroke={colors.kelp} strokeWidth={2} />
            <Path d={`M${x} 10l-9 -4v8z`} fill={colors.kelp} />
          </Svg>
        ) : null}
      </View>
      <View style={styles.words}>
        <Text variant="small" color="ink2">
          {left}
        </Text>
        <Text variant="small" color="ink2">
          {right}
        </Text>
      </View>
      {stop ? <Button kind="quiet" label={stop.label} onPress={stop.onPress} style={styles.stop} /> : null}
    </View>
  );
}

const styles = StyleSheet.create({
  progress: { gap: 2 },
  line: { height: 20 },
  words: { flexDirection: 'row', justifyContent: 'space-between', gap: space.m },
  stop: { alignSelf: 'flex-start', marginLeft: -space.l },
});
