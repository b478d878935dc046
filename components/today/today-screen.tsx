import { useQuery } from '@tanstack/react-query';
import { router } from 'expo-router';
import { StyleSheet, View } from 'react-native';
import { dateText } from '../../shared/units';
import type { Run } from '../../shared/wire/runs';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { Page } from '../ui/page';
import { QueryState } from '../ui/query-state';
import { Row } from '../ui/row';
import { Text } from '../ui/text';

/** What waits for this person, what is baking, what changed. */
export function TodayScreen() {
  const { me, production } = useSession();
  const { wide } = useBreakpoint();
  const technical = useMay('technical-director');
  const models = useQuery(queries.models(production!.id));
  const scenes = useQuery(queries.scenes(production!.id));
  const runs = useQuery({ ...queries.runs(production!.id), refetchInterval: 10_000 });
  const unfinished = (runs.data?.items ?? []).filter((run) => run.status !== 'complete');
  const mine = unfinished.filter((run) => run.status === 'stopped' && run.createdBy.id === me?.id);
  const unconfirmed = technical ? (models.data?.items ?? []).filter((model) => !model.unitConfirmed) : [];
  const complete = (runs.data?.items ?? []).filter((run) => run.status === 'complete');
  return (
    <Page
      title="Today"
      lead={`${production!.name}, ${new Date().toLocaleDateString('en-GB', { weekday: 'long', day: 'numeric', month: 'long' })}`}
    >
      <View style={[styles.columns, wide && styles.wide]}>
        <View style={styles.main}>
          <Section title="Waits for you">
            <QueryState query={models} loading="Looking what waits …">
              {() =>
                unconfirmed.length + mine.length === 0 ? (
                  <Text color="ink2">Nothing waits for you.</Text>
                ) : (
                  <>
                    {unconfirmed.map((model) => (
                      <Row
                        key={model.id}
                        title={`Confirm the size of ${model.name}`}
                        note={`${model.fileName}, brought in by ${model.createdBy.name}`}
                        onPress={() => router.push(`/models/${model.id}`)}
                      />
                    ))}
                    {mine.map((run) => (
                      <Row
                        key={run.id}
                        title={`Go on with run ${run.number}`}
                        note={`${run.scene.name}: ${posesKept(run)} of ${run.frames + 1} frames are kept`}
                        onPress={() => router.push(`/scenes/${run.scene.id}`)}
                      />
                    ))}
                  </>
                )
              }
            </QueryState>
          </Section>
          <Section title="New runs">
            <QueryState query={runs} loading="Fetching the runs …">
              {() =>
                complete.length === 0 ? (
                  <Text color="ink2">Runs appear here when somebody has baked one.</Text>
                ) : (
                  complete
                    .slice(0, 6)
                    .map((run) => (
                      <Row
                        key={run.id}
                        title={`Look at run ${run.number}, ${run.scene.name}`}
                        note={`by ${run.createdBy.name}, ${dateText(run.completedAt ?? run.createdAt)}`}
                        value={`${run.frames} f`}
                        onPress={() => router.push(`/runs/${run.id}`)}
                      />
                    ))
                )
              }
            </QueryState>
          </Section>
        </View>
        <View style={wide ? styles.side : styles.main}>
          <Section title="Baking now">
            {unfinished.filter((run) => run.status === 'baking').length === 0 ? (
              <Text color="ink2">Nothing is baking.</Text>
            ) : (
              unfinished
                .filter((run) => run.status === 'baking')
                .map((run) => (
                  <Row
                    key={run.id}
                    title={`Run ${run.number}, ${run.scene.name}`}
                    note={`by ${run.createdBy.name}`}
                    value={`${posesKept(run)} of ${run.frames + 1}`}
                  />
                ))
            )}
          </Section>
          <Section title="Scenes">
            <QueryState query={scenes} loading="Fetching the scenes …">
              {({ items }) =>
                items.length === 0 ? (
                  <Text color="ink2">A scene is set up from a model’s page.</Text>
                ) : (
                  items
                    .slice(0, 8)
                    .map((scene) => (
                      <Row
                        key={scene.id}
                        title={`Open ${scene.name}`}
                        note={`${scene.model.name}, revision ${scene.latestRevision.number} by ${scene.latestRevision.createdBy.name}`}
                        onPress={() => router.push(`/scenes/${scene.id}`)}
                      />
                    ))
                )
              }
            </QueryState>
          </Section>
        </View>
      </View>
    </Page>
  );
}

const posesKept = (run: Run) => Math.min(run.frames + 1, run.chunks.length * 24);

function Section({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <View style={styles.section}>
      <Text variant="section" level={2}>
        {title}
      </Text>
      {children}
    </View>
  );
}

const styles = StyleSheet.create({
  columns: { gap: space.xxl },
  wide: { flexDirection: 'row', gap: space.huge },
  main: { flex: 1, gap: space.xxl, minWidth: 0 },
  side: { width: 380, gap: space.xxl },
  section: { gap: space.xs },
});
