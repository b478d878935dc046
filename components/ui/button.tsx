import { Pressable, StyleSheet, View, type StyleProp, type ViewStyle } from 'react-native';
import { RADIUS, space, TARGET } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from './text';

interface Props {
  label: string;
  /** what it costs, in Mono beside the word */
  cost?: string;
  kind?: 'primary' | 'plain' | 'quiet' | 'attention';
  /** shown instead of the label while it works */
  working?: string | false;
  /** why it cannot be pressed, said beside it; '' when the reason is plain to see */
  disabledReason?: string | null;
  /** for screen readers, when the label alone is not enough */
  hint?: string;
  pressed?: boolean;
  /** less air inside, for four in a row on a phone */
  tight?: boolean;
  onPress: () => void;
  style?: StyleProp<ViewStyle>;
}

/** A word that does something. One primary on a screen. */
export function Button({
  label,
  cost,
  kind = 'plain',
  working = false,
  disabledReason,
  hint,
  pressed,
  tight,
  onPress,
  style,
}: Props) {
  const { colors } = useTheme();
  const off = disabledReason !== undefined && disabledReason !== null;
  const disabled = off || Boolean(working);
  const quiet = kind === 'quiet';
  const ground =
    off || (quiet && !pressed)
      ? 'transparent'
      : kind === 'primary'
        ? colors.kelp
        : pressed
          ? colors.kelpWash
          : colors.paper;
  const border =
    kind === 'attention' ? colors.apricot : (kind === 'primary' || pressed) && !off ? colors.kelp : colors.edge;
  const ink = off ? 'ink2' : kind === 'primary' ? 'onKelp' : kind === 'attention' ? 'apricot' : quiet ? 'kelp' : 'ink';
  return (
    <View style={style}>
      <Pressable
        role="button"
        aria-label={working ? working : cost ? `${label}, ${cost}` : label}
        aria-disabled={disabled}
        aria-pressed={pressed}
        accessibilityHint={hint}
        disabled={disabled}
        onPress={onPress}
        style={[
          styles.button,
          !quiet && styles.framed,
          { backgroundColor: ground, borderColor: border },
          off && styles.dashed,
          tight && styles.tight,
        ]}
      >
        <Text variant="button" color={ink} numberOfLines={1} style={quiet && !off && styles.underlined}>
          {working ? working : label}
        </Text>
        {cost && !working ? (
          <Text variant="small" color={ink} numberOfLines={1}>
            {cost}
          </Text>
        ) : null}
      </Pressable>
      {disabledReason ? (
        <Text variant="note" color="ink2" style={styles.reason}>
          {disabledReason}
        </Text>
      ) : null}
    </View>
  );
}

const styles = StyleSheet.create({
  button: {
    minHeight: TARGET,
    minWidth: TARGET,
    paddingHorizontal: space.m,
    flexDirection: 'row',
    alignItems: 'center',
    justifyContent: 'center',
    gap: space.s,
    borderRadius: RADIUS,
  },
  framed: { borderWidth: 1 },
  tight: { paddingHorizontal: space.xs },
  dashed: { borderStyle: 'dashed' },
  underlined: { textDecorationLine: 'underline' },
  reason: { marginTop: space.xs },
});
