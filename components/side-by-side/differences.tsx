import { useMemo, useState } from 'react';
import { StyleSheet, View } from 'react-native';
import { furthest, worstCompression } from '../runs/gauge-series';
import type { OpenRun } from '../runs/use-run';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Caution, Loading } from '../ui/states';
import { Text } from '../ui/text';
import { whatDiffers, type Difference } from './what-differs';

const LONG_WORDS = 14;

/** What differs in the set-up of two runs, what was measured, and on demand what is the same. */
export function Differences({ a, b, most }: { a: OpenRun; b: OpenRun; most?: number }) {
  const { colors } = useTheme();
  const [all, setAll] = useState(false);
  const found = useMemo(
    () => (a.document && b.document ? whatDiffers(a.document, b.document) : null),
    [a.document, b.document],
  );
  if (!found) return <Loading>Comparing the set-ups …</Loading>;
  const { differences, same } = found;
  const shown = most && !all ? differences.slice(0, most) : differences;
  const hidden = differences.length - shown.length;
  const gauge = a.traces?.gauges[0]?.id ?? 'Gauge';
  const measured = [
    { name: `${gauge} furthest`, left: distance(a), right: distance(b) },
    { name: 'Worst compression', left: compression(a), right: compression(b) },
  ];
  return (
    <View style={styles.table}>
      <View style={styles.head}>
        <Text variant="section" level={2}>
          What differs
        </Text>
        <Text variant="note" color="ink2">{`${differences.length} of ${found.settings} settings`}</Text>
      </View>
      <View style={[styles.line, styles.foot, { borderBottomColor: colors.ink }]}>
        <Text variant="note" color="ink2" style={styles.name}>
          Setting
        </Text>
        <Text variant="dense" color="kelp" style={[styles.cell, styles.run]}>{`run ${a.run!.number}`}</Text>
        <Text variant="dense" color="plum" style={[styles.cell, styles.run]}>{`run ${b.run!.number}`}</Text>
      </View>
      {shown.length === 0 ? (
        <Text variant="dense" color="ink2" style={styles.words}>
          Nothing in the set-up differs.
        </Text>
      ) : (
        shown.map((row) => <Line key={row.name} row={row} />)
      )}
      <Text variant="dense" color="ink2" style={styles.words}>
        Measured
      </Text>
      {measured.map((row) => (
        <Line key={row.name} row={row} />
      ))}
      {all ? (
        <>
          <Text variant="dense" color="ink2" style={styles.words}>
            The same in both
          </Text>
          {same.map((row) => (
            <Line key={row.name} row={{ ...row, right: '' }} />
          ))}
        </>
      ) : null}
      <Button
        kind="quiet"
        label={
          all
            ? 'Show only what differs'
            : hidden > 0
              ? `Show ${hidden} more, and the ${same.length} that are the same`
              : `Show the ${same.length} that are the same`
        }
        onPress={() => setAll(!all)}
        style={styles.more}
      />
      <Caution />
    </View>
  );
}

/** Short values stand in columns; long ones each on a line of their own, named. */
function Line({ row }: { row: Difference }) {
  const { colors } = useTheme();
  const long = Math.max(row.left.length, row.right.length) > LONG_WORDS;
  if (long) {
    return (
      <View style={[styles.long, { borderBottomColor: colors.hair }]}>
        <Text variant="dense">{row.name}</Text>
        <Text variant="small" color={row.right ? 'kelp' : 'ink'}>
          {row.left}
        </Text>
        {row.right ? (
          <Text variant="small" color="plum">
            {row.right}
          </Text>
        ) : null}
      </View>
    );
  }
  return (
    <View style={[styles.line, { borderBottomColor: colors.hair }]}>
      <Text variant="dense" style={styles.name}>
        {row.name}
      </Text>
      <Text variant="quantity" style={styles.cell}>
        {row.right ? row.left : ''}
      </Text>
      <Text variant="quantity" style={styles.cell}>
        {row.right || row.left}
      </Text>
    </View>
  );
}

const distance = ({ traces }: OpenRun) => (traces?.gauges[0] ? `${furthest(traces).toFixed(1)} mm` : '–');
const compression = ({ traces }: OpenRun) => (traces ? worstCompression(traces).toFixed(2) : '–');

const styles = StyleSheet.create({
  table: { paddingHorizontal: 20, paddingVertical: 14 },
  head: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'baseline' },
  line: { flexDirection: 'row', gap: 8, minHeight: 40, alignItems: 'center', borderBottomWidth: 1 },
  foot: { minHeight: 32 },
  long: { paddingVertical: 8, gap: 2, borderBottomWidth: 1 },
  name: { flex: 1.4 },
  cell: { flex: 1, textAlign: 'right' },
  run: { fontWeight: '600' },
  words: { paddingTop: 12, paddingBottom: 4 },
  more: { alignSelf: 'flex-start', marginLeft: -12, marginVertical: 4 },
});
