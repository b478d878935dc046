import { router } from 'expo-router';
import { View } from 'react-native';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Empty } from '../ui/states';

export function NotFoundScreen() {
  const { colors } = useTheme();
  return (
    <View style={{ flex: 1, padding: 24, backgroundColor: colors.page }}>
      <Empty
        title="There is nothing here."
        action={<Button label="Go to Today" onPress={() => router.replace('/today')} />}
      >
        The address may be mistyped, or what it named is gone.
      </Empty>
    </View>
  );
}
