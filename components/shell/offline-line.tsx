import { onlineManager } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { StyleSheet, View } from 'react-native';
import { clockText } from '../../shared/units';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Text } from '../ui/text';

/** Since when there is no connection, and what is safe. */
export function OfflineLine() {
  const { colors } = useTheme();
  const [since, setSince] = useState<Date | null>(() => (onlineManager.isOnline() ? null : new Date()));
  useEffect(() => onlineManager.subscribe((online) => setSince(online ? null : new Date())), []);
  if (!since) return null;
  return (
    <View role="status" style={[styles.line, { borderLeftColor: colors.apricot, backgroundColor: colors.apricotWash }]}>
      <Text variant="note">
        {`No connection since ${clockText(since)}. Your draft is safe here; what the studio keeps comes again when it returns.`}
      </Text>
    </View>
  );
}

const styles = StyleSheet.create({
  line: { borderLeftWidth: 3, paddingHorizontal: space.l, paddingVertical: space.s },
});
