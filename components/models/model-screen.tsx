import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { router } from 'expo-router';
import { useEffect, useMemo, useState } from 'react';
import { ScrollView, StyleSheet, View } from 'react-native';
import { figures, likeWhat, lengthText, lengthUnitFor, MODEL_UNITS } from '../../shared/units';
import { modelSchema, type Model, type ModelChange } from '../../shared/wire/models';
import { sceneSchema } from '../../shared/wire/scenes';
import type { Patch } from '../../solver/index';
import { api } from '../api/client';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import { defaultDocument } from '../../shared/default-document';
import { bodyName, prepareAhead } from '../solver-client/solver-client';
import { PoseSource } from '../stage/pose-source';
import { stageModule } from '../stage/stage-module';
import { StageView } from '../stage/stage-view';
import { space } from '../theme/tokens';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { Card } from '../ui/card';
import { PhoneHead } from '../ui/phone-head';
import { QueryState } from '../ui/query-state';
import { Fact } from '../ui/fact';
import { Row } from '../ui/row';
import { Text } from '../ui/text';
import { TitleBlock } from '../ui/title-block';
import { sizeOf, sizeText } from '../../shared/model-size';

/** One model: the body as it arrived, its size, what was read and what was not. */
export function ModelScreen({ modelId }: { modelId: string }) {
  const model = useQuery(queries.model(modelId));
  const patches = useQuery(queries.patches(modelId));
  return (
    <QueryState query={model} loading="Fetching the model …" alone>
      {(data) => <ModelPage model={data} patches={patches.data ?? null} fault={patches.error?.message ?? null} />}
    </QueryState>
  );
}

function ModelPage({ model, patches, fault }: { model: Model; patches: Patch[] | null; fault: string | null }) {
  const { production } = useSession();
  const { scheme, colors } = useTheme();
  const { wide } = useBreakpoint();
  const maySetUp = useMay('technical-director');
  const client = useQueryClient();
  const [pose] = useState(() => new PoseSource());
  const [chosen, setChosen] = useState<ReadonlySet<number>>(new Set());
  const scaled = useQuery({
    queryKey: ['model-metric', model.id, model.unit],
    staleTime: Infinity,
    gcTime: 60_000,
    enabled: patches !== null,
    queryFn: async () => {
      const { scalePatch } = await stageModule();
      return patches!.map((patch) => scalePatch(patch, model.unit));
    },
  });
  const metric = scaled.data;
  const drawn = useQuery({
    queryKey: ['model-surface', model.id, model.unit],
    staleTime: Infinity,
    gcTime: 60_000,
    enabled: metric !== undefined,
    queryFn: async () => (await stageModule()).displaySurface(metric!),
  });
  const surface = drawn.data ?? null;
  const presets = useQuery(queries.materials(production!.id));
  const sceneName = `${model.name}, first look`.slice(0, 120);
  const items = presets.data?.items;
  const firstScene = useMemo(
    () => (items ? defaultDocument(model, sceneName, items) : null),
    [model, sceneName, items],
  );
  // Once its size is settled the body is set up while its report is read, so that the first look moves at once.
  useEffect(
    () =>
      maySetUp
        ? prepareAhead(
            model.unitConfirmed && metric && firstScene
              ? { body: bodyName(firstScene), scene: firstScene, patches: metric }
              : null,
          )
        : undefined,
    [maySetUp, model.unitConfirmed, metric, firstScene],
  );
  const change = useMutation({
    mutationFn: (body: ModelChange) => api.patch(`/api/models/${model.id}`, body, modelSchema),
    onSuccess: (next) => {
      client.setQueryData(queries.model(model.id).queryKey, next);
      void client.invalidateQueries({ queryKey: ['models', model.productionId] });
    },
  });
  const setUp = useMutation({
    mutationFn: () =>
      api.post(
        `/api/productions/${model.productionId}/scenes`,
        { name: sceneName, document: firstScene ?? defaultDocument(model, sceneName, []) },
        sceneSchema,
      ),
    onSuccess: (scene) => {
      void client.invalidateQueries({ queryKey: ['scenes', model.productionId] });
      void client.prefetchQuery(queries.revision(scene.latestRevision.id));
      router.push(`/scenes/${scene.id}?look=first`);
    },
  });
  const { report } = model;
  const skipped = report.skipped.reduce((sum, s) => sum + s.count, 0);
  const longest = Math.max(...sizeOf(model));
  const unit = lengthUnitFor(longest);
  const stage = (
    <StageView
      label={`${model.name} as it arrived, ${sizeText(model)}`}
      surface={surface}
      pose={pose}
      scheme={scheme}
      up="z"
      chosen={chosen}
      unit={unit}
      onPick={(hit) => setChosen(new Set([hit.patch]))}
    >
      <View style={styles.corner} pointerEvents="none">
        <Text variant="note">
          {fault ??
            scaled.error?.message ??
            drawn.error?.message ??
            (surface ? 'As it arrived.' : 'Fetching the patches …')}
        </Text>
        {chosen.size > 0 && patches ? (
          <Text variant="note" color="ink2">
            {patches[[...chosen][0]!]?.name}
          </Text>
        ) : null}
      </View>
      <TitleBlock
        cells={[
          { label: 'Model', value: model.name, wide: true },
          { label: 'From', value: model.fileName },
          { label: 'Patches', value: String(model.patchCount), mono: true },
          { label: 'Unit', value: `${shortUnit(model.unit)}${model.unitConfirmed ? '' : ' ?'}`, mono: true },
        ]}
        phone={[
          { label: 'Patches', value: String(model.patchCount), mono: true },
          { label: 'Unit', value: `${shortUnit(model.unit)}${model.unitConfirmed ? '' : ' ?'}`, mono: true },
        ]}
      />
    </StageView>
  );
  const words = (
    <ScrollView style={styles.fill} contentContainerStyle={styles.report}>
      {model.unitConfirmed ? null : (
        <View style={[styles.question, { backgroundColor: colors.apricotWash, borderColor: colors.apricot }]}>
          <Text variant="card" level={2}>{`Is it ${lengthText(longest, unit)} long?`}</Text>
          <Text variant="dense">
            {`${report.declaredUnit ? `The file says ${report.declaredUnit.name}` : `The file names no unit; ${MODEL_UNITS.find((u) => u.metres === model.unit)?.name ?? 'metres'} were taken`}. That is about as long ${likeWhat(longest)}.`}
          </Text>
          <View style={styles.answers}>
            <Button
              kind="primary"
              label={`Yes, ${lengthText(longest, unit)}`}
              disabledReason={maySetUp ? null : 'Technical directors decide.'}
              working={change.isPending && 'Saving …'}
              onPress={() => change.mutate({ unitConfirmed: true })}
            />
          </View>
          {maySetUp ? (
            <>
              <Text variant="note" color="ink2">
                Or it was drawn in:
              </Text>
              <View style={styles.answers}>
                {MODEL_UNITS.filter((each) => Math.abs(each.metres / model.unit - 1) > 1e-9).map((each) => (
                  <Button
                    key={each.short}
                    label={each.name}
                    cost={lengthText(
                      (longest / model.unit) * each.metres,
                      lengthUnitFor((longest / model.unit) * each.metres),
                    )}
                    onPress={() => change.mutate({ unit: each.metres, unitConfirmed: true })}
                  />
                ))}
              </View>
            </>
          ) : null}
          {change.error ? (
            <Text variant="note" color="apricot" role="alert">
              {change.error.message}
            </Text>
          ) : null}
        </View>
      )}
      <Card title="What was read" summary={`${report.imported} of ${report.declared} surfaces`}>
        <Fact name="Surfaces declared" value={String(report.declared)} />
        <Fact name="Imported" value={String(report.imported)} />
        <Fact
          name="Skipped"
          value={String(skipped)}
          note={
            report.skipped.map((s) => `${s.count} × ${s.entity}: ${s.reason}`).join('; ') || 'Nothing was left out.'
          }
        />
        {report.remarks.map((remark) => (
          <Text key={remark} variant="note" color="ink2">
            {remark}
          </Text>
        ))}
        {model.unitConfirmed ? (
          <Fact
            name="Size"
            value={sizeText(model)}
            action={
              maySetUp ? (
                <Button kind="quiet" label="Change unit" onPress={() => change.mutate({ unitConfirmed: false })} />
              ) : null
            }
          />
        ) : null}
      </Card>
      <Card
        title="Edges"
        summary={
          report.edges.open + report.edges.gapped === 0
            ? 'all joined'
            : `${report.edges.open} open, ${report.edges.gapped} with a gap`
        }
      >
        <Fact name="Joined" value={String(report.edges.joined)} />
        <Fact
          name="With a gap"
          value={String(report.edges.gapped)}
          note={
            report.edges.gapped > 0
              ? `Largest ${lengthText(report.edges.largestGap * model.unit, unit)}. Gaps are bridged for the inside test.`
              : undefined
          }
        />
        <Fact
          name="Open"
          value={String(report.edges.open)}
          note={report.edges.open > 0 ? 'An open rim is closed for the inside test only.' : undefined}
        />
        <Fact name="Pinched to a point" value={String(report.edges.degenerate)} />
      </Card>
      <Card title="Patch list" summary={`${model.patchCount}`}>
        {(patches ?? []).slice(0, 400).map((patch, k) => (
          <Row
            key={k}
            title={patch.name}
            note={`${patch.group ? `${patch.group}, ` : ''}degree ${patch.degreeU} × ${patch.degreeV}${patch.weights.some((w) => w !== 1) ? ', rational' : ''}`}
            value={`${patch.countU} × ${patch.countV}`}
            label={`Show ${patch.name} on the body`}
            onPress={() => setChosen(new Set([k]))}
          />
        ))}
        {(patches?.length ?? 0) > 400 ? (
          <Text variant="note" color="ink2">{`and ${figures(patches!.length - 400)} more`}</Text>
        ) : null}
      </Card>
    </ScrollView>
  );
  const foot = (
    <View style={[styles.foot, { borderTopColor: colors.ink }]}>
      {setUp.error ? (
        <Text variant="note" color="apricot" role="alert">
          {setUp.error.message}
        </Text>
      ) : null}
      <Button
        kind={model.unitConfirmed ? 'primary' : 'plain'}
        label="Set up a scene"
        working={setUp.isPending && 'Setting up …'}
        disabledReason={
          !maySetUp ? 'Technical directors set scenes up.' : !model.unitConfirmed ? 'Confirm the size first.' : null
        }
        onPress={() => setUp.mutate()}
      />
    </View>
  );
  if (wide) {
    return (
      <View style={styles.split}>
        <View style={styles.fill}>{stage}</View>
        <View style={[styles.column, { borderLeftColor: colors.hair }]}>
          {words}
          {foot}
        </View>
      </View>
    );
  }
  return (
    <View style={styles.fill}>
      <PhoneHead title={model.name} back="/models" />
      <View style={styles.phoneStage}>{stage}</View>
      {words}
      {foot}
    </View>
  );
}

const shortUnit = (metres: number) =>
  MODEL_UNITS.find((u) => Math.abs(u.metres / metres - 1) < 1e-9)?.short ?? `${figures(metres)} m`;

const styles = StyleSheet.create({
  split: { flex: 1, flexDirection: 'row' },
  fill: { flex: 1, minHeight: 0 },
  column: { width: 420, borderLeftWidth: 1 },
  report: { paddingBottom: space.xl },
  question: { margin: space.l, padding: space.l, gap: space.s, borderWidth: 1, borderRadius: 2 },
  answers: { flexDirection: 'row', flexWrap: 'wrap', gap: space.s },
  corner: { position: 'absolute', left: 12, top: 10 },
  phoneStage: { height: '42%' },
  foot: { borderTopWidth: 1, padding: space.l, gap: space.s },
});
