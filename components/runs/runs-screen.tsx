import { useQuery } from '@tanstack/react-query';
import { router } from 'expo-router';
import { useState } from 'react';
import { StyleSheet, View } from 'react-native';
import { dateText } from '../../shared/units';
import type { Run } from '../../shared/wire/runs';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { space } from '../theme/tokens';
import { Button } from '../ui/button';
import { Page } from '../ui/page';
import { QueryState } from '../ui/query-state';
import { Row } from '../ui/row';
import { Empty } from '../ui/states';
import { Text } from '../ui/text';

const STATE_WORDS: Record<Run['status'], string> = { baking: 'baking', complete: '', stopped: 'stopped' };

/** Runs of the production: open one, or set two side by side. */
export function RunsScreen({ chosen }: { chosen?: string }) {
  const { production } = useSession();
  const runs = useQuery({ ...queries.runs(production!.id), refetchInterval: 10_000 });
  const [picked, setPicked] = useState<string[]>(chosen ? [chosen] : []);
  const pick = (id: string) =>
    setPicked((now) => (now.includes(id) ? now.filter((each) => each !== id) : [...now, id].slice(-2)));
  const action = (
    <Button
      kind="primary"
      label="Side by side"
      disabledReason={['Choose two runs.', 'Choose one more.', null][picked.length]}
      onPress={() => router.push({ pathname: '/runs/side-by-side', params: { left: picked[0]!, right: picked[1]! } })}
    />
  );
  return (
    <Page title="Runs" lead="Baked results. A run never changes." action={action}>
      <QueryState query={runs} loading="Fetching the runs …">
        {({ items }) =>
          items.length === 0 ? (
            <Empty title="No runs yet.">A technical director bakes one on the workbench; it appears here.</Empty>
          ) : (
            <>
              {items.map((run) => (
                <Row
                  key={run.id}
                  title={`Run ${run.number}, ${run.scene.name}`}
                  note={`${run.model.name}, revision ${run.revision.number}, ${run.provenance.partCount} parts, by ${run.createdBy.name}, ${dateText(run.createdAt)}`}
                  value={`${run.frames} frames`}
                  stacks
                  state={
                    <View style={styles.state}>
                      {run.status === 'complete' ? (
                        <>
                          <Button
                            label={picked.includes(run.id) ? 'Chosen' : 'Choose'}
                            hint={`Choose run ${run.number} to compare`}
                            pressed={picked.includes(run.id)}
                            onPress={() => pick(run.id)}
                          />
                          <Button
                            label="Open"
                            hint={`Open run ${run.number}`}
                            onPress={() => router.push(`/runs/${run.id}`)}
                          />
                        </>
                      ) : (
                        <Text variant="note" color="apricot">
                          {STATE_WORDS[run.status]}
                        </Text>
                      )}
                    </View>
                  }
                />
              ))}
            </>
          )
        }
      </QueryState>
    </Page>
  );
}

const styles = StyleSheet.create({ state: { flexDirection: 'row', gap: space.s, flexWrap: 'wrap' } });
