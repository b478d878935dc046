import { useQuery } from '@tanstack/react-query';
import { router, useGlobalSearchParams, type Href } from 'expo-router';
import { Fragment } from 'react';
import { Pressable, StyleSheet, View } from 'react-native';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { space, TARGET } from '../theme/tokens';
import { Text } from '../ui/text';

interface Crumb {
  words: string;
  to?: Href;
  label?: string;
}

/** Where one is: production, list, and the thing that is open. */
export function Crumbs({ path }: { path: string }) {
  const { production } = useSession();
  const [, place = '', id = ''] = path.split('/');
  const { left = '', right = '' } = useGlobalSearchParams<{ left?: string; right?: string }>();
  const beside = id === 'side-by-side';
  const model = useQuery({ ...queries.model(id), enabled: place === 'models' && id !== '' });
  const scene = useQuery({ ...queries.scene(id), enabled: place === 'scenes' && id !== '' });
  const run = useQuery({
    ...queries.run(beside ? left : id),
    enabled: place === 'runs' && id !== '' && (!beside || left !== ''),
  });
  const other = useQuery({ ...queries.run(right), enabled: beside && right !== '' });
  const crumbs: Crumb[] = [{ words: production?.name ?? '' }];
  if (model.data) crumbs.push({ words: 'Models', to: '/models', label: 'All models' }, { words: model.data.name });
  else if (scene.data) {
    const { model: of } = scene.data;
    crumbs.push({ words: of.name, to: `/models/${of.id}`, label: `Model ${of.name}` }, { words: scene.data.name });
  } else if (run.data) {
    const { scene: of, number } = run.data;
    crumbs.push(
      { words: of.name, to: `/scenes/${of.id}`, label: `Scene ${of.name}` },
      { words: beside ? `Run ${number} beside run ${other.data?.number ?? '…'}` : `Run ${number}` },
    );
  }
  return (
    <View style={styles.crumbs}>
      {crumbs.map(({ words, to, label }, k) => {
        const last = k === crumbs.length - 1 && k > 0;
        const text = (
          <Text variant="dense" color={last ? 'ink' : 'ink2'} numberOfLines={1} style={last && styles.last}>
            {words}
          </Text>
        );
        return (
          <Fragment key={words}>
            {k > 0 ? (
              <Text variant="dense" color="ink2" aria-hidden>
                /
              </Text>
            ) : null}
            {to ? (
              <Pressable role="link" aria-label={label} onPress={() => router.push(to)} style={styles.link}>
                {text}
              </Pressable>
            ) : (
              <View style={styles.word}>{text}</View>
            )}
          </Fragment>
        );
      })}
    </View>
  );
}

const styles = StyleSheet.create({
  crumbs: { flex: 1, minWidth: 0, flexDirection: 'row', alignItems: 'center', gap: space.s },
  link: { minHeight: TARGET, justifyContent: 'center', flexShrink: 1, minWidth: 0 },
  word: { flexShrink: 1, minWidth: 0 },
  last: { fontWeight: '600' },
});
