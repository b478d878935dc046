import { Pressable, StyleSheet, View } from 'react-native';
import { figures } from '../../shared/units';
import type { ProofCheck } from '../../solver/index';
import { space, TARGET } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Text } from '../ui/text';
import { CHECKS } from './checks';
import { errorText, hereText, passes, textbookText } from './row-words';
import type { CheckState, CheckStates } from './use-proof';

/** The checks with their headline number beside the textbook's; touch one to see it. */
export function ProofTable({
  checks,
  chosen,
  onChoose,
}: {
  checks: CheckStates;
  chosen: ProofCheck;
  onChoose: (id: ProofCheck) => void;
}) {
  const { colors } = useTheme();
  const { phone } = useBreakpoint();
  return (
    <View>
      <View style={[styles.row, phone && styles.tight, styles.head, { borderBottomColor: colors.ink }]}>
        {['case', 'textbook', 'here', 'off by'].map((word, k) => (
          <Text key={word} variant="note" color="ink2" style={COLUMNS[k]}>
            {word}
          </Text>
        ))}
      </View>
      {CHECKS.map(({ id, title }) => {
        const [textbook, here, off] = cells(checks[id]);
        const good = checks[id].state === 'done' && checks[id].answer.result.rows.every(passes);
        const bad = checks[id].state === 'failed' || (checks[id].state === 'done' && !good);
        const here_ = id === chosen;
        return (
          <Pressable
            key={id}
            role="button"
            aria-pressed={here_}
            aria-label={[title, textbook && `textbook ${textbook}`, here && `here ${here}`, off]
              .filter(Boolean)
              .join(', ')}
            onPress={() => onChoose(id)}
            style={[
              styles.row,
              phone && styles.tight,
              { borderBottomColor: colors.hair },
              here_ && { backgroundColor: colors.kelpWash },
            ]}
          >
            <Text variant={here_ ? 'strong' : 'dense'} style={COLUMNS[0]}>
              {title}
            </Text>
            <Text variant="small" style={COLUMNS[1]}>
              {textbook}
            </Text>
            <Text variant="small" style={COLUMNS[2]}>
              {here}
            </Text>
            <Text variant="small" color={good ? 'kelp' : bad ? 'apricot' : 'ink2'} style={COLUMNS[3]}>
              {off}
            </Text>
          </Pressable>
        );
      })}
    </View>
  );
}

function cells(check: CheckState): [string, string, string] {
  switch (check.state) {
    case 'waiting':
      return ['', '', 'not run yet'];
    case 'running':
      return ['', '…', `${figures(100 * check.share, 2)} % done`];
    case 'stopped':
      return ['', '', 'stopped'];
    case 'failed':
      return ['', '', 'found no answer'];
    case 'done': {
      const row = check.answer.result.rows[0]!;
      return [textbookText(row), hereText(row), errorText(row)];
    }
  }
}

const styles = StyleSheet.create({
  row: {
    minHeight: TARGET,
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.s,
    borderBottomWidth: 1,
    paddingHorizontal: space.xs,
  },
  tight: { gap: space.xs, marginHorizontal: -space.s, paddingHorizontal: space.s },
  head: { minHeight: 32 },
  name: { flex: 1, minWidth: 92 },
  number: { flexGrow: 1, flexShrink: 0, flexBasis: 80, textAlign: 'right' },
});
const COLUMNS = [styles.name, styles.number, styles.number, styles.number];
