import type { ReactNode } from 'react';
import { StyleSheet, View } from 'react-native';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { PhoneHead } from './phone-head';

/** A state that has a whole screen to itself: room around it, and on a phone the way back. */
export function Alone({ children }: { children: ReactNode }) {
  const { wide } = useBreakpoint();
  return (
    <View>
      {wide ? null : <PhoneHead title="" back="/today" />}
      <View style={styles.alone}>{children}</View>
    </View>
  );
}

const styles = StyleSheet.create({ alone: { paddingHorizontal: space.xl, maxWidth: 720 } });
