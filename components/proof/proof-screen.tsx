import { useRef, useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import { figures } from '../../shared/units';
import type { ProofCheck } from '../../solver/index';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Progress } from '../ui/progress';
import { Caution } from '../ui/states';
import { Text } from '../ui/text';
import { CHECKS } from './checks';
import { ProofDetail } from './proof-detail';
import { ProofTable } from './proof-table';
import { passes } from './row-words';
import { useProof, type CheckStates } from './use-proof';

/** What a whole sheet took on a machine with two slow cores, s: the forecast until this device has run one. */
const FIRST_GUESS = 8;

/** The solver against closed-form answers, computed on the device at hand. */
export function ProofScreen() {
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const { checks, running, run, stop } = useProof();
  const [chosen, setChosen] = useState<ProofCheck>('cantilever');
  const page = useRef<ScrollView>(null);
  const detailAt = useRef(0);
  const words = CHECKS.find(({ id }) => id === chosen)!;
  const choose = (id: ProofCheck) => {
    setChosen(id);
    // On a phone what was chosen stands below the sheet.
    page.current?.scrollTo({ y: detailAt.current, animated: false });
  };
  const sheet = (
    <>
      <Text variant={wide ? 'title' : 'titlePhone'} level={1}>
        Proof sheet
      </Text>
      <Text color="ink2" style={styles.lead}>
        The solver against textbook answers, computed on this device when you run it.
      </Text>
      <Summary checks={checks} />
      <ProofTable checks={checks} chosen={chosen} onChoose={choose} />
      <View style={styles.foot}>
        {running ? <Running checks={checks} stop={stop} /> : <RunButton checks={checks} run={run} />}
        <Caution />
      </View>
    </>
  );
  const detail = <ProofDetail words={words} check={checks[chosen]} />;
  if (!wide) {
    return (
      <ScrollView ref={page} contentContainerStyle={styles.phone}>
        {sheet}
        <View
          onLayout={(event) => {
            detailAt.current = event.nativeEvent.layout.y;
          }}
          style={[styles.below, { borderTopColor: colors.hair }]}
        >
          {detail}
        </View>
      </ScrollView>
    );
  }
  return (
    <View style={styles.desk}>
      <ScrollView style={[styles.left, { borderRightColor: colors.hair }]} contentContainerStyle={styles.padded}>
        {sheet}
      </ScrollView>
      <ScrollView style={styles.fill} contentContainerStyle={styles.padded}>
        {detail}
      </ScrollView>
    </View>
  );
}

function Summary({ checks }: { checks: CheckStates }) {
  const { colors } = useTheme();
  const done = Object.values(checks).flatMap((check) => (check.state === 'done' ? [check] : []));
  const first = done[0]?.answer;
  const cells = [
    ['Passed', `${done.filter(({ answer }) => answer.result.rows.every(passes)).length} of ${CHECKS.length}`],
    ['Kernels', first?.kernels ?? '…'],
    ['Solver', first?.solverVersion ?? '…'],
    [
      'Took',
      done.length === 0
        ? '…'
        : `${figures(
            done.reduce((sum, { seconds }) => sum + seconds, 0),
            2,
          )} s`,
    ],
  ] as const;
  return (
    <View style={[styles.summary, { borderTopColor: colors.ink, borderBottomColor: colors.hair }]}>
      {cells.map(([label, value]) => (
        <View key={label}>
          <Text variant="note" color="ink2">
            {label}
          </Text>
          <Text variant="quantity" numberOfLines={1}>
            {value}
          </Text>
        </View>
      ))}
    </View>
  );
}

function Running({ checks, stop }: { checks: CheckStates; stop: () => void }) {
  const share = CHECKS.reduce((sum, { id }) => {
    const check = checks[id];
    return sum + (check.state === 'running' ? check.share : check.state === 'waiting' ? 0 : 1);
  }, 0);
  const now = CHECKS.find(({ id }) => checks[id].state === 'running');
  return (
    <Progress
      label="Proof sheet"
      share={share / CHECKS.length}
      left={`${Math.floor(share)} of ${CHECKS.length} cases`}
      right={now?.title ?? ''}
      stop={{ label: 'Stop, keep what is done', onPress: stop }}
    />
  );
}

function RunButton({ checks, run }: { checks: CheckStates; run: () => void }) {
  const took = CHECKS.map(({ id }) => checks[id]).reduce<number | null>(
    (sum, check) => (sum === null || check.state !== 'done' ? null : sum + check.seconds),
    0,
  );
  return (
    <Button
      kind="primary"
      label={took === null ? 'Run the sheet' : 'Run again'}
      cost={`about ${figures(Math.max(1, took ?? FIRST_GUESS), 1)} s`}
      onPress={run}
    />
  );
}

const styles = StyleSheet.create({
  desk: { flex: 1, flexDirection: 'row' },
  left: { flex: 1, maxWidth: 640, borderRightWidth: 1 },
  fill: { flex: 1, minWidth: 0 },
  padded: { padding: 40, paddingTop: space.xl },
  phone: { padding: space.l, paddingBottom: space.huge },
  below: { borderTopWidth: 1, marginTop: space.xl, paddingTop: space.l },
  lead: { marginTop: space.xs, marginBottom: space.l },
  summary: {
    flexDirection: 'row',
    flexWrap: 'wrap',
    columnGap: space.xl,
    rowGap: space.xs,
    borderTopWidth: 1,
    borderBottomWidth: 1,
    paddingVertical: space.s,
  },
  foot: { gap: space.l, marginTop: space.l },
});
