import { router, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { useTheme } from '../theme/use-theme';
import { Button } from './button';
import { Text } from './text';

/** Top line of a screen that fills the phone: the way back, where one is, one or two quiet actions. */
export function PhoneHead({ title, back, children }: { title: string; back: Href; children?: ReactNode }) {
  const { colors } = useTheme();
  return (
    <View role="banner" style={[styles.head, { borderBottomColor: colors.hair }]}>
      <Button kind="quiet" label="Back" onPress={() => (router.canGoBack() ? router.back() : router.replace(back))} />
      <Text variant="card" level={1} numberOfLines={1} style={styles.title}>
        {title}
      </Text>
      {children}
    </View>
  );
}

const styles = StyleSheet.create({
  head: { height: 52, flexDirection: 'row', alignItems: 'center', borderBottomWidth: 1, paddingRight: 8 },
  title: { flex: 1, minWidth: 0 },
});
