import { StyleSheet, View } from 'react-native';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Trace } from '../charts/trace';
import type { LiveTraces as Values } from './use-live';

/** Energy, volume, worst compression and the gauge: traces that double as readouts. */
export function LiveTraces({ values, gauge }: { values: Values; gauge: string | null }) {
  const { wide } = useBreakpoint();
  const { colors } = useTheme();
  const cells = [
    <Trace key="e" title="Energy, J" series={[{ name: 'energy', values: values.energy }]} />,
    <Trace key="v" title="Volume change, %" series={[{ name: 'volume', values: values.volume }]} />,
    <Trace
      key="c"
      title="Worst compression"
      zero={false}
      series={[{ name: 'compression', values: values.compression }]}
      threshold={{ value: 0.6, words: 'care below 0.6' }}
    />,
    <Trace
      key="g"
      title={`${gauge ?? 'No gauge'} moved, mm`}
      series={[{ name: 'gauge', values: values.gauge, kind: 'left' }]}
    />,
  ];
  return (
    <View style={[styles.traces, wide ? { ...styles.row, borderTopColor: colors.hair } : styles.stack]}>
      {cells.map((cell, k) => (
        <View key={k} style={[styles.cell, wide && k > 0 && { borderLeftWidth: 1, borderLeftColor: colors.hair }]}>
          {cell}
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  traces: {},
  row: { flexDirection: 'row', height: 170, borderTopWidth: 1 },
  stack: { padding: 16, gap: 16 },
  cell: { flex: 1, paddingHorizontal: 16, paddingVertical: 8, minWidth: 0 },
});
