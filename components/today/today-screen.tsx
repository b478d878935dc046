import { useQuery } from '@tanstack/react-query';
import { router } from 'expo-router';
import { Pressable, StyleSheet, View } from 'react-native';
import { dateText } from '../../shared/units';
import type { Run } from '../../shared/wire/runs';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import { sizeText } from '../../shared/model-size';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Page } from '../ui/page';
import { Progress } from '../ui/progress';
import { QueryState } from '../ui/query-state';
import { Text } from '../ui/text';
import { Need, Nothing, Section } from './today-parts';
import { whatChanged, type Change } from './what-changed';

const WEEK_MS = 7 * 24 * 3600 * 1000;
const POSES_PER_CHUNK = 24;

/** What waits for this person, what is baking, what changed. */
export function TodayScreen() {
  const { me, production } = useSession();
  const { wide } = useBreakpoint();
  const { colors } = useTheme();
  const technical = useMay('technical-director');
  const models = useQuery(queries.models(production!.id));
  const scenes = useQuery(queries.scenes(production!.id));
  const runs = useQuery({ ...queries.runs(production!.id), refetchInterval: 10_000 });
  const all = runs.data?.items ?? [];
  const broken = all.filter((run) => run.status === 'stopped' && run.createdBy.id === me?.id);
  const unconfirmed = technical ? (models.data?.items ?? []).filter((model) => !model.unitConfirmed) : [];
  const waiting = unconfirmed.length + broken.length;
  const fresh = all.filter((run) => run.completedAt !== null && Date.now() - Date.parse(run.completedAt) < WEEK_MS);
  const baking = all.filter((run) => run.status === 'baking');
  const changes = whatChanged(models.data?.items ?? [], scenes.data?.items ?? [], all, 8);
  const day = new Date().toLocaleDateString('en-GB', { weekday: 'long', day: 'numeric', month: 'long' });
  return (
    <Page title="Today" lead={`${day}. ${models.data && runs.data ? waitingWords(waiting) : ''}`}>
      <View style={wide ? styles.columns : styles.stack}>
        <View style={[styles.stack, wide && styles.main]}>
          <Section title="Waiting for you" count={waiting}>
            <QueryState query={models} loading="Looking what waits …">
              {() => (
                <>
                  {waiting === 0 ? <Nothing>Nothing waits for you.</Nothing> : null}
                  {unconfirmed.map((model, k) => (
                    <Need
                      key={model.id}
                      title={`${model.name}, new file`}
                      note={`The file makes it ${sizeText(model)}. Brought in by ${model.createdBy.name}.`}
                      tag="Size to confirm"
                      tagColor="apricot"
                      action="Confirm the size"
                      primary={k === 0}
                      onPress={() => router.push(`/models/${model.id}`)}
                    />
                  ))}
                  {broken.map((run) => (
                    <Need
                      key={run.id}
                      title={`${run.scene.name}, run ${run.number}`}
                      note={`The bake stopped. ${posesKept(run)} of ${run.frames + 1} frames are kept.`}
                      tag="Bake unfinished"
                      tagColor="apricot"
                      action="Go on"
                      onPress={() => router.push(`/scenes/${run.scene.id}`)}
                    />
                  ))}
                </>
              )}
            </QueryState>
          </Section>
          <Section title="Baked this week" count={fresh.length}>
            <QueryState query={runs} loading="Fetching the runs …">
              {() => (
                <>
                  {fresh.length === 0 ? <Nothing>A run appears here when somebody has baked one.</Nothing> : null}
                  {fresh.slice(0, 6).map((run) => (
                    <Need
                      key={run.id}
                      title={`${run.scene.name}, run ${run.number}`}
                      note={`${run.frames} frames, baked by ${run.createdBy.name}, ${dateText(run.completedAt!)}.`}
                      tag="Run ready"
                      tagColor="kelp"
                      action="Watch"
                      onPress={() => router.push(`/runs/${run.id}`)}
                    />
                  ))}
                </>
              )}
            </QueryState>
          </Section>
        </View>
        <View style={[styles.stack, wide && styles.side, { borderLeftColor: colors.hair }]}>
          <Section title="Baking now" count={baking.length}>
            {baking.length === 0 ? <Nothing>Nothing is baking.</Nothing> : null}
            {baking.map((run) => (
              <View key={run.id} style={styles.bake}>
                <Text variant="dense">{`${run.scene.name}, run ${run.number}`}</Text>
                <Progress
                  label={`Baking run ${run.number}`}
                  share={posesKept(run) / (run.frames + 1)}
                  left={`${posesKept(run)} of ${run.frames + 1} frames`}
                  right={`by ${run.createdBy.name}`}
                />
              </View>
            ))}
          </Section>
          <Section title="What changed">
            <QueryState query={scenes} loading="Fetching what changed …">
              {() =>
                changes.length === 0 ? (
                  <Nothing>Models, revisions and runs appear here as people make them.</Nothing>
                ) : (
                  changes.map((change) => <ChangeLine key={change.id} change={change} />)
                )
              }
            </QueryState>
          </Section>
        </View>
      </View>
    </Page>
  );
}

function ChangeLine({ change }: { change: Change }) {
  const { colors } = useTheme();
  return (
    <Pressable
      role="link"
      aria-label={`${change.words} ${change.thing}`}
      onPress={() => router.push(change.to)}
      style={[styles.change, { borderBottomColor: colors.hair }]}
    >
      <Text variant="small" color="ink2" style={styles.when}>
        {whenText(change.at)}
      </Text>
      <Text variant="dense" style={styles.what}>
        {`${change.words} `}
        <Text variant="dense" color="kelp">
          {change.thing}
        </Text>
      </Text>
    </Pressable>
  );
}

const NUMBERS = ['Nothing waits', 'One thing waits', 'Two things wait', 'Three things wait', 'Four things wait'];
const waitingWords = (count: number) => `${NUMBERS[count] ?? `${count} things wait`} for you.`;

const posesKept = (run: Run) => Math.min(run.frames + 1, run.chunks.length * POSES_PER_CHUNK);

/** The hour today, the day before. */
function whenText(iso: string): string {
  const moment = new Date(iso);
  const today = moment.toDateString() === new Date().toDateString();
  return today
    ? moment.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })
    : moment.toLocaleDateString('en-GB', { day: 'numeric', month: 'short' });
}

const styles = StyleSheet.create({
  columns: { flexDirection: 'row', gap: space.xxl },
  stack: { gap: space.xxl },
  main: { flex: 1, minWidth: 0 },
  side: { width: 368, borderLeftWidth: 1, paddingLeft: space.xxl },
  bake: { paddingTop: space.m },
  change: {
    flexDirection: 'row',
    gap: space.m,
    paddingVertical: space.s,
    minHeight: 44,
    borderBottomWidth: 1,
    alignItems: 'baseline',
  },
  when: { width: 48 },
  what: { flex: 1, minWidth: 0 },
});
