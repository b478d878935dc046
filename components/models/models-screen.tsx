import { useQuery, useQueryClient } from '@tanstack/react-query';
import { router } from 'expo-router';
import { useState } from 'react';
import { modelSchema } from '../../shared/wire/models';
import { dateText } from '../../shared/units';
import { api } from '../api/client';
import { queries } from '../api/queries';
import { useMay, useSession } from '../api/session';
import { Button } from '../ui/button';
import { Page } from '../ui/page';
import { Progress } from '../ui/progress';
import { QueryState } from '../ui/query-state';
import { Row } from '../ui/row';
import { Empty, Fault } from '../ui/states';
import { chooseFile, useFileDrop } from '../ui/choose-file';
import { sizeText } from '../../shared/model-size';

/** Models of the production, and the way to bring one in. */
export function ModelsScreen() {
  const { production } = useSession();
  const mayUpload = useMay('technical-director');
  const client = useQueryClient();
  const models = useQuery(queries.models(production!.id));
  const [upload, setUpload] = useState<{ name: string; share: number; stop: () => void } | null>(null);
  const [fault, setFault] = useState<string | null>(null);

  const bring = async (file: File | null) => {
    if (!file) return;
    const abort = new AbortController();
    setFault(null);
    setUpload({ name: file.name, share: 0, stop: () => abort.abort() });
    try {
      const model = await api.upload(
        `/api/productions/${production!.id}/models`,
        file,
        modelSchema,
        (share) => setUpload((current) => current && { ...current, share }),
        abort.signal,
      );
      await client.invalidateQueries({ queryKey: ['models', production!.id] });
      router.push(`/models/${model.id}`);
    } catch (error) {
      if ((error as Error).name !== 'AbortError') setFault((error as Error).message);
    } finally {
      setUpload(null);
    }
  };
  useFileDrop(mayUpload && !upload ? (file) => void bring(file) : null);
  const action = (
    <Button
      kind="primary"
      label="Bring a model in"
      disabledReason={mayUpload ? null : 'Technical directors bring models in.'}
      working={upload !== null && 'Bringing it in …'}
      onPress={() => void chooseFile('.stp,.step,.p21,.bpt,.txt').then(bring)}
    />
  );
  return (
    <Page
      title="Models"
      lead="STEP files with B-spline surfaces, and Bézier-patch text. Untidy is fine."
      action={action}
    >
      {upload ? (
        <Progress
          label={`Bringing in ${upload.name}`}
          share={upload.share}
          left={
            upload.share < 1
              ? `${upload.name}, ${Math.round(upload.share * 100)} %`
              : `${upload.name}: reading its patches`
          }
          right={upload.share < 1 ? 'sending' : 'a few seconds'}
          stop={{ label: 'Stop, keep nothing', onPress: upload.stop }}
        />
      ) : null}
      {fault ? <Fault title="This file was not taken in.">{fault}</Fault> : null}
      <QueryState query={models} loading="Fetching the models …">
        {({ items }) =>
          items.length === 0 ? (
            <Empty title="No models yet.">
              Curved-surface models appear here once a technical director brings them in.
            </Empty>
          ) : (
            <>
              {items.map((model) => (
                <Row
                  key={model.id}
                  title={model.name}
                  note={`${model.fileName}, ${model.patchCount} patches, by ${model.createdBy.name}, ${dateText(model.createdAt)}`}
                  value={sizeText(model)}
                  stacks
                  onPress={() => router.push(`/models/${model.id}`)}
                />
              ))}
            </>
          )
        }
      </QueryState>
    </Page>
  );
}
