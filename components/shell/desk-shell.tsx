import { Redirect, router, usePathname, type Href } from 'expo-router';
import { useState, type ReactNode } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { ROLE_WORDS } from '../../shared/words';
import { useSession } from '../api/session';
import { space, TARGET } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Text } from '../ui/text';
import { Wordmark } from '../ui/wordmark';
import { AccountSheet } from './account-sheet';
import { Crumbs } from './crumbs';
import { OfflineLine } from './offline-line';

const PLACES: { label: string; short?: string; href: Href; at: string }[] = [
  { label: 'Today', href: '/today', at: '/today' },
  { label: 'Models', href: '/models', at: '/models' },
  { label: 'Scenes', href: '/scenes', at: '/scenes' },
  { label: 'Runs', href: '/runs', at: '/runs' },
  { label: 'Materials', href: '/materials', at: '/materials' },
  { label: 'Proof sheet', short: 'Proof', href: '/proof', at: '/proof' },
];

/** Screens that fill the phone themselves and bring their own bottom row. */
const FILLS = /^\/(scenes|runs|models)\/[^/]+$/;

/** The frame of every signed-in screen: top line, the places of the desk, who is here. */
export function DeskShell({ children }: { children: ReactNode }) {
  const { me, production } = useSession();
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  const path = usePathname();
  const [open, setOpen] = useState(false);
  if (me === null) return <Redirect href="/sign-in" />;
  if (me === undefined) {
    return (
      <View style={[styles.page, styles.waiting, { backgroundColor: colors.page }]}>
        <Wordmark width={120} />
        <Text color="ink2">Opening the desk …</Text>
      </View>
    );
  }
  const filling = FILLS.test(path);
  const account = `${me.name}, ${production ? ROLE_WORDS[production.role] : 'no production'}`;
  return (
    <View style={[styles.page, { backgroundColor: colors.page }]}>
      {!wide && filling ? null : (
        <View role="banner" style={[styles.top, { height: wide ? 56 : 52, borderBottomColor: colors.hair }]}>
          <Pressable role="link" aria-label="Lollop, today" onPress={() => router.push('/today')} style={styles.mark}>
            <Wordmark />
          </Pressable>
          {wide ? (
            <>
              <Crumbs path={path} />
              <Places path={path} />
            </>
          ) : (
            <View style={styles.fill} />
          )}
          <Pressable
            role="button"
            aria-label={`${account}: account and look`}
            onPress={() => setOpen(true)}
            style={[styles.account, wide && { borderLeftWidth: 1, borderLeftColor: colors.hair }]}
          >
            {wide ? (
              <Text variant="note" color="ink2" numberOfLines={1}>
                {account}
              </Text>
            ) : (
              <Text variant="button" color="kelp" numberOfLines={1} style={styles.underlined}>
                {production?.name ?? me.name}
              </Text>
            )}
          </Pressable>
        </View>
      )}
      <OfflineLine />
      <View role="main" style={styles.fill}>
        {production ? children : <NoProduction />}
      </View>
      {!wide && !filling ? (
        <View style={[styles.bottom, { borderTopColor: colors.hair, backgroundColor: colors.page }]}>
          <Places path={path} />
        </View>
      ) : null}
      {open ? <AccountSheet onClose={() => setOpen(false)} /> : null}
    </View>
  );
}

function NoProduction() {
  return (
    <View style={{ padding: 24 }}>
      <Text variant="section">You are in no production yet.</Text>
      <Text color="ink2">A lead or an administrator of your studio can add you to one.</Text>
    </View>
  );
}

function Places({ path }: { path: string }) {
  const { colors } = useTheme();
  const { wide } = useBreakpoint();
  return (
    <View role="navigation" aria-label="Desk" style={[styles.places, !wide && styles.spread]}>
      {PLACES.map((place) => {
        const here = path === place.at || path.startsWith(`${place.at}/`);
        return (
          <Pressable
            key={place.at}
            role="link"
            aria-label={place.label}
            aria-current={here ? 'page' : undefined}
            onPress={() => router.push(place.href)}
            style={[
              styles.place,
              !wide && styles.narrow,
              wide
                ? { borderBottomColor: here ? colors.kelp : 'transparent' }
                : { borderTopColor: here ? colors.kelp : 'transparent' },
            ]}
          >
            <Text variant={here ? 'button' : 'body'} color={here ? 'ink' : 'ink2'} numberOfLines={1}>
              {wide ? place.label : (place.short ?? place.label)}
            </Text>
          </Pressable>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  page: { flex: 1 },
  waiting: { alignItems: 'center', justifyContent: 'center', gap: space.l },
  top: { flexDirection: 'row', alignItems: 'center', borderBottomWidth: 1, paddingLeft: 20 },
  mark: { minHeight: TARGET, justifyContent: 'center', marginRight: space.xl },
  fill: { flex: 1, minHeight: 0 },
  account: { minHeight: TARGET, justifyContent: 'center', paddingHorizontal: space.l, maxWidth: 260 },
  places: { flexDirection: 'row', alignSelf: 'stretch' },
  spread: { justifyContent: 'space-between', flex: 1 },
  place: {
    minHeight: TARGET,
    minWidth: TARGET,
    justifyContent: 'center',
    alignItems: 'center',
    paddingHorizontal: space.m,
    borderTopWidth: 3,
    borderBottomWidth: 3,
    borderColor: 'transparent',
  },
  narrow: { paddingHorizontal: space.xs },
  underlined: { textDecorationLine: 'underline' },
  bottom: { height: 60, borderTopWidth: 1, flexDirection: 'row' },
});
