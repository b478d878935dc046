import { useQuery } from '@tanstack/react-query';
import { router } from 'expo-router';
import { dateText } from '../../shared/units';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { Button } from '../ui/button';
import { Page } from '../ui/page';
import { QueryState } from '../ui/query-state';
import { Row } from '../ui/row';
import { Empty } from '../ui/states';

export function ScenesScreen() {
  const { production } = useSession();
  const scenes = useQuery(queries.scenes(production!.id));
  return (
    <Page title="Scenes" lead="A model with its parts, materials, supports and loads. Open one to see it move.">
      <QueryState query={scenes} loading="Fetching the scenes …">
        {({ items }) =>
          items.length === 0 ? (
            <Empty
              title="No scenes yet."
              action={<Button label="See the models" onPress={() => router.push('/models')} />}
            >
              A scene is set up from a model’s page.
            </Empty>
          ) : (
            <>
              {items.map((scene) => (
                <Row
                  key={scene.id}
                  title={scene.name}
                  note={`${scene.model.name}. ${scene.latestRevision.remark || 'No remark'}, ${scene.latestRevision.createdBy.name}, ${dateText(scene.latestRevision.createdAt)}`}
                  value={`rev ${scene.latestRevision.number}`}
                  onPress={() => router.push(`/scenes/${scene.id}`)}
                />
              ))}
            </>
          )
        }
      </QueryState>
    </Page>
  );
}
