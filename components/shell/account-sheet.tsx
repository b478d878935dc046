import { StyleSheet, View } from 'react-native';
import { ROLE_WORDS } from '../../shared/words';
import { useSession } from '../api/session';
import { space } from '../theme/tokens';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { ChoiceOfFew } from '../ui/choice-of-few';
import { Sheet } from '../ui/sheet';
import { Text } from '../ui/text';

/** Which production, day or night, and the way out. */
export function AccountSheet({ onClose }: { onClose: () => void }) {
  const { me, production, choose, signOut } = useSession();
  const theme = useTheme();
  return (
    <Sheet title={me?.name ?? 'Account'} onClose={onClose}>
      <Text color="ink2">{`${me?.email ?? ''}${production ? `, ${ROLE_WORDS[production.role]}` : ''}`}</Text>
      <View style={styles.group}>
        <Text variant="strong">Production</Text>
        {me?.memberships.map(({ production: each }) => (
          <Button
            key={each.id}
            label={each.name}
            pressed={each.id === production?.id}
            onPress={() => choose(each.id)}
          />
        ))}
      </View>
      <View style={styles.group}>
        <Text variant="strong">Look</Text>
        <ChoiceOfFew
          label="Look"
          value={theme.choice}
          onChange={theme.choose}
          options={[
            { value: 'system', label: 'As the device' },
            { value: 'day', label: 'Day' },
            { value: 'night', label: 'Night' },
          ]}
        />
      </View>
      <Button label="Sign out" onPress={() => void signOut()} />
    </Sheet>
  );
}

const styles = StyleSheet.create({ group: { gap: space.s } });
