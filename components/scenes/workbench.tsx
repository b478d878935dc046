import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import { Pressable, ScrollView, StyleSheet, View } from 'react-native';
import { sceneDocumentSchema } from '../../shared/scene-document';
import { figures, lengthUnitFor, massText } from '../../shared/units';
import type { Revision, SceneSummary } from '../../shared/wire/scenes';
import { revisionSchema } from '../../shared/wire/scenes';
import { type Patch } from '../../solver/index';
import { api } from '../api/client';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import type { SolverEvents } from '../solver-client/solver-client';
import type { Hit } from '../stage/stage-scene';
import { StageView } from '../stage/stage-view';
import { useBreakpoint } from '../theme/use-breakpoint';
import { useTheme } from '../theme/use-theme';
import { Button } from '../ui/button';
import { PhoneHead } from '../ui/phone-head';
import { Progress } from '../ui/progress';
import { Text } from '../ui/text';
import { TitleBlock } from '../ui/title-block';
import { keepDraft, type Draft } from './draft-store';
import { HoldsCard } from './holds-card';
import { LiveTraces } from './live-traces';
import { pickedPatches, togglePatch } from './picking';
import { MaterialCard } from './material-card';
import { PartsCard } from './parts-card';
import { RunControls, ShowControls, type Show } from './run-controls';
import { SaveSheet } from './save-sheet';
import { stageMarks } from './stage-marks';
import { TimeCard } from './time-card';
import { useBake } from './use-bake';
import { useConvergence } from './use-convergence';
import { useHistory } from './use-history';
import { useLive } from './use-live';

const CARDS = ['Material', 'Parts', 'Holds', 'Time', 'Traces'] as const;

interface Props {
  scene: SceneSummary;
  revision: Revision;
  patches: Patch[];
  draft: Draft | null;
  /** a first look starts moving by itself */
  moveAtOnce: boolean;
}

/** The technical director's bench: the body alive, and everything about it in cards. */
export function Workbench({ scene, revision: opened, patches, draft, moveAtOnce }: Props) {
  const { me } = useSession();
  const { wide } = useBreakpoint();
  const { colors, scheme } = useTheme();
  const mayEdit = useMay('technical-director');
  const client = useQueryClient();
  const [revision, setRevision] = useState(opened);
  const { document, edit, undo, redo, canUndo, canRedo } = useHistory(
    draft?.basedOn === opened.number ? draft.document : opened.document,
  );
  const changed = document !== revision.document && JSON.stringify(document) !== JSON.stringify(revision.document);
  const bakeEvents = useRef<SolverEvents>({});
  const live = useLive(document, patches, document.up, bakeEvents, moveAtOnce);
  const convergence = useConvergence(document, patches);
  const baking = useBake(scene.id, live.client, bakeEvents);
  const [card, setCard] = useState<(typeof CARDS)[number]>('Material');
  const [show, setShow] = useState<Show>('clay');
  const [picking, setPicking] = useState<string | null>(null);
  const [saving, setSaving] = useState(false);
  const runs = useQuery({ ...queries.runs(scene.productionId), enabled: mayEdit });
  const unfinished = (runs.data?.items ?? []).find(
    (run) => run.revision.id === revision.id && run.status !== 'complete' && run.createdBy.id === me?.id,
  );

  useEffect(
    () => keepDraft(scene.id, changed ? { basedOn: revision.number, document } : null),
    [scene.id, changed, revision.number, document],
  );

  const { ready, frame } = live;
  const unit = lengthUnitFor(ready?.report.diagonal ?? 1);
  const fault = useMemo(() => sceneDocumentSchema.safeParse(document).error?.issues[0]?.message ?? null, [document]);
  const picked = useMemo(() => pickedPatches(document, picking), [document, picking]);
  const marks = useMemo(() => (ready ? stageMarks(document, ready) : []), [document, ready]);
  const onPick = (hit: Hit) => {
    if (!picking) return;
    edit(`region-${picking}`, (d) => togglePatch(d, picking, hit.patch));
  };

  const save = async (remark: string) => {
    const saved = await api.post(
      `/api/scenes/${scene.id}/revisions`,
      { basedOn: revision.number, remark, document },
      revisionSchema,
    );
    keepDraft(scene.id, null);
    setRevision({ ...saved, document });
    client.setQueryData(queries.revision(saved.id).queryKey, saved);
    void client.invalidateQueries({ queryKey: ['scenes'] });
    void client.invalidateQueries({ queryKey: ['scene', scene.id] });
    setSaving(false);
    return saved;
  };
  const [bakeFault, setBakeFault] = useState<string | null>(null);
  const startBake = async () => {
    setBakeFault(null);
    try {
      const target = changed ? await save('Saved for a bake') : revision;
      if (ready) await baking.start(target.id, document, ready);
    } catch (error) {
      setBakeFault((error as Error).message);
    }
  };
  const time = document.time;
  const frames = time.kind === 'motion' ? time.frames : 0;
  const rate = frame?.stepsPerSecond ?? null;
  const seconds = time.kind === 'motion' && rate ? (frames * time.substeps) / rate : null;
  const bakeReason = !mayEdit
    ? 'Technical directors bake.'
    : time.kind !== 'motion'
      ? 'Choose motion under Time.'
      : fault
        ? fault
        : !ready
          ? 'The body is being prepared.'
          : null;
  const shownFrame = baking.bake ? String(baking.bake.pose) : frameNumber(frame?.time, time);
  const bakeButton = (
    <Button
      kind="primary"
      label={wide ? `Bake ${frames} frames` : 'Bake'}
      cost={seconds ? `${wide ? 'about ' : ''}${figures(seconds, 2)} s` : undefined}
      disabledReason={bakeReason}
      onPress={() => void startBake()}
      style={wide ? undefined : styles.bake}
    />
  );
  const progress = baking.bake ? (
    <View style={styles.progress}>
      <Progress
        label="Baking"
        share={baking.bake.pose / baking.bake.poses}
        left={`${baking.bake.pose} of ${baking.bake.poses} frames${baking.bake.waiting ? ', no connection, kept here' : ''}`}
        right={baking.bake.sending ? 'sending the rest' : `about ${Math.ceil(baking.bake.secondsLeft)} s left`}
        stop={{ label: `Stop, keep ${baking.bake.pose} frames`, onPress: baking.stop }}
      />
    </View>
  ) : null;
  const complaint = baking.fault ?? bakeFault ?? (live.message?.fault ? live.message.text : null);
  const notices = (
    <>
      {complaint ? (
        <View
          style={[styles.notice, { backgroundColor: colors.apricotWash, borderLeftColor: colors.apricot }]}
          role="alert"
        >
          <Text variant="dense">{complaint}</Text>
        </View>
      ) : live.message ? (
        <View style={[styles.notice, { backgroundColor: colors.kelpWash, borderLeftColor: colors.kelp }]}>
          <Text variant="dense">{live.message.text}</Text>
        </View>
      ) : null}
      {unfinished && !baking.bake && mayEdit && !changed ? (
        <View style={[styles.notice, styles.resume, { borderLeftColor: colors.apricot }]}>
          <Text variant="dense" style={styles.fill}>{`Run ${unfinished.number} was broken off.`}</Text>
          <Button
            label="Continue bake"
            disabledReason={ready ? null : 'The body is being prepared.'}
            onPress={() => void baking.resume(unfinished)}
          />
        </View>
      ) : null}
    </>
  );
  const stage = (
    <StageView
      label={`${scene.model.name}, ${live.playing ? 'moving' : 'standing'}`}
      surface={ready?.surface ?? null}
      pose={live.pose}
      scheme={scheme}
      up={document.up}
      obstacles={document.obstacles}
      tint={show === 'parts' ? 'parts' : 'clay'}
      seeThrough={show === 'see-through'}
      chosen={picked}
      marks={marks}
      unit={unit}
      onPick={picking ? onPick : undefined}
      onPull={live.playing && !picking ? (pull) => live.client.current?.pull(pull) : undefined}
    >
      <View style={styles.corner} pointerEvents="none">
        <Text variant="note">
          {picking
            ? `Tap patches for ${picking}.`
            : live.progress
              ? `${live.progress} …`
              : live.playing
                ? `Live, ${rate ? figures(rate) : '…'} steps/s`
                : baking.bake
                  ? 'Baking.'
                  : changed
                    ? 'Not yet saved.'
                    : 'At hand.'}
        </Text>
        {live.playing && !picking ? (
          <Text variant="note" color="ink2">
            Drag the body to pull it.
          </Text>
        ) : null}
      </View>
      <TitleBlock
        cells={[
          { label: 'Model', value: scene.model.name, wide: true },
          { label: 'Scene', value: scene.name },
          { label: 'Revision', value: `${revision.number}${changed ? ' + draft' : ''}`, mono: true },
          { label: 'Mass', value: ready ? massText(ready.mass) : '…', mono: true },
          { label: 'Unit', value: unit, mono: true },
          { label: 'Frame', value: shownFrame, mono: true },
        ]}
        phone={[
          { label: 'Revision', value: `${revision.number}${changed ? ' + draft' : ''}`, mono: true },
          { label: 'Frame', value: shownFrame, mono: true },
        ]}
      />
    </StageView>
  );
  const materialCard = <MaterialCard document={document} edit={edit} mass={ready?.mass ?? null} />;
  const partsCard = (
    <PartsCard document={document} edit={edit} ready={ready} rate={rate} unit={unit} convergence={convergence} />
  );
  const holdsCard = (
    <HoldsCard document={document} edit={edit} ready={ready} unit={unit} picking={picking} onPick={setPicking} />
  );
  const timeCard = <TimeCard document={document} edit={edit} />;
  const traces = <LiveTraces values={live.traces} gauge={document.gauges[0]?.id ?? null} />;
  const saveReason = !mayEdit
    ? 'Technical directors save. You may try things here.'
    : !changed
      ? 'Nothing has changed.'
      : fault;
  const sheet = saving ? (
    <SaveSheet number={revision.number + 1} onClose={() => setSaving(false)} onSave={save} />
  ) : null;

  if (!wide) {
    return (
      <View style={styles.fill}>
        <PhoneHead title={scene.name} back="/scenes">
          {canUndo ? <Button kind="quiet" label="Undo" onPress={undo} /> : null}
          {mayEdit && changed ? <Button kind="quiet" label="Save" onPress={() => setSaving(true)} /> : null}
        </PhoneHead>
        <View style={styles.phoneStage}>{stage}</View>
        {progress ?? (
          <View style={[styles.phoneControls, { borderBottomColor: colors.hair }]}>
            <RunControls live={live} compact />
            {mayEdit ? bakeButton : null}
          </View>
        )}
        <ScrollView style={styles.fill}>
          {notices}
          {card === 'Material'
            ? materialCard
            : card === 'Parts'
              ? partsCard
              : card === 'Holds'
                ? holdsCard
                : card === 'Time'
                  ? timeCard
                  : traces}
          {card === 'Parts' ? (
            <View style={styles.show}>
              <ShowControls show={show} onShow={setShow} />
            </View>
          ) : null}
          {mayEdit ? null : (
            <Text variant="note" color="ink2" style={styles.show}>
              You may try things here. Technical directors save and bake.
            </Text>
          )}
        </ScrollView>
        <View role="tablist" style={[styles.tabs, { borderTopColor: colors.hair }]}>
          {CARDS.map((name) => (
            <Pressable
              key={name}
              role="tab"
              aria-selected={card === name}
              aria-label={name}
              onPress={() => setCard(name)}
              style={[styles.tab, { borderTopColor: card === name ? colors.kelp : 'transparent' }]}
            >
              <Text variant={card === name ? 'button' : 'dense'} color={card === name ? 'ink' : 'ink2'}>
                {name}
              </Text>
            </Pressable>
          ))}
        </View>
        {sheet}
      </View>
    );
  }
  return (
    <View style={styles.split}>
      <View style={styles.fill}>
        <View style={styles.fill}>{stage}</View>
        <View style={[styles.controls, { borderTopColor: colors.hair }]}>
          <RunControls live={live} baking={baking.bake !== null} />
          <View style={styles.fill} />
          <ShowControls show={show} onShow={setShow} />
        </View>
        {traces}
      </View>
      <View style={[styles.column, { borderLeftColor: colors.hair }]}>
        <View style={[styles.head, { borderBottomColor: colors.hair }]}>
          <Button kind="quiet" label="Undo" disabledReason={canUndo ? null : ''} onPress={undo} />
          <Button kind="quiet" label="Redo" disabledReason={canRedo ? null : ''} onPress={redo} />
          <View style={styles.fill} />
          {mayEdit ? (
            <Button
              label={`Save revision ${revision.number + 1}`}
              disabledReason={changed && !fault ? null : ''}
              onPress={() => setSaving(true)}
            />
          ) : null}
        </View>
        <ScrollView style={styles.fill}>
          {notices}
          {fault ? (
            <Text variant="note" color="apricot" style={styles.show} role="alert">
              {fault}
            </Text>
          ) : null}
          {materialCard}
          {partsCard}
          {holdsCard}
          {timeCard}
          {mayEdit ? null : (
            <Text variant="note" color="ink2" style={styles.show}>
              {saveReason}
            </Text>
          )}
        </ScrollView>
        <View style={[styles.foot, { borderTopColor: colors.ink }]}>{progress ?? bakeButton}</View>
      </View>
      {sheet}
    </View>
  );
}

function frameNumber(time: number | undefined, setting: Revision['document']['time']): string {
  return time === undefined || setting.kind !== 'motion' ? '0' : String(Math.round(time * setting.framesPerSecond));
}

const styles = StyleSheet.create({
  fill: { flex: 1, minHeight: 0, minWidth: 0 },
  split: { flex: 1, flexDirection: 'row' },
  column: { width: 368, borderLeftWidth: 1 },
  head: {
    minHeight: 60,
    flexDirection: 'row',
    alignItems: 'center',
    borderBottomWidth: 1,
    paddingRight: 20,
    paddingLeft: 4,
  },
  foot: { borderTopWidth: 1, padding: 12, paddingHorizontal: 20 },
  controls: {
    minHeight: 60,
    flexDirection: 'row',
    flexWrap: 'wrap',
    alignItems: 'center',
    gap: 8,
    paddingHorizontal: 20,
    paddingVertical: 6,
    borderTopWidth: 1,
  },
  corner: { position: 'absolute', left: 12, top: 10 },
  phoneStage: { height: '42%' },
  phoneControls: {
    flexDirection: 'row',
    gap: 8,
    padding: 8,
    paddingHorizontal: 12,
    borderBottomWidth: 1,
    alignItems: 'flex-start',
  },
  bake: { flex: 1 },
  tabs: { height: 60, flexDirection: 'row', borderTopWidth: 1 },
  tab: { flex: 1, alignItems: 'center', justifyContent: 'center', borderTopWidth: 3, marginTop: -1 },
  notice: { borderLeftWidth: 3, margin: 12, padding: 10 },
  resume: { flexDirection: 'row', alignItems: 'center', gap: 8 },
  show: { padding: 16 },
  progress: { paddingHorizontal: 16, paddingTop: 8 },
});
