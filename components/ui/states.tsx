import { useEffect, useState, type ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { CAUTION } from '../../shared/words';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Button } from './button';
import { Text } from './text';

const NOTICED_MS = 300;

/** What will come here and how to bring it. */
export function Empty({ title, children, action }: { title: string; children: ReactNode; action?: ReactNode }) {
  return (
    <View style={styles.state}>
      <Text variant="section">{title}</Text>
      <Text color="ink2">{children}</Text>
      {action ? <View style={styles.action}>{action}</View> : null}
    </View>
  );
}

/** What stopped, what is kept, what to try. */
export function Fault({ title, children, onRetry }: { title: string; children: ReactNode; onRetry?: () => void }) {
  return (
    <View style={styles.state} role="alert">
      <Text variant="section" color="apricot">
        {title}
      </Text>
      <Text color="ink2">{children}</Text>
      {onRetry ? (
        <View style={styles.action}>
          <Button label="Try again" onPress={onRetry} />
        </View>
      ) : null}
    </View>
  );
}

/** A list on its way; said only when it takes long enough to be noticed. */
export function Loading({ children }: { children: ReactNode }) {
  const [late, setLate] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setLate(true), NOTICED_MS);
    return () => clearTimeout(timer);
  }, []);
  if (!late) return null;
  return (
    <View style={styles.state} aria-busy role="status">
      <Text color="ink2">{children}</Text>
    </View>
  );
}

/** The fixed wording wherever a number can leave. */
export function Caution() {
  const { colors } = useTheme();
  return (
    <View style={[styles.caution, { borderLeftColor: colors.apricot }]}>
      <Text variant="note" color="ink2">
        {CAUTION}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  state: { gap: space.s, paddingVertical: space.xl },
  action: { flexDirection: 'row', marginTop: space.s },
  caution: { borderLeftWidth: 3, paddingLeft: space.m, paddingVertical: space.xs },
});
