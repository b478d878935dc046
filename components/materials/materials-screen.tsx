import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { View } from 'react-native';
import { figures, stressText } from '../../shared/units';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { Field } from '../ui/field';
import { Page } from '../ui/page';
import { QueryState } from '../ui/query-state';
import { Row } from '../ui/row';
import { Caution, Empty } from '../ui/states';

/** The presets with where their numbers come from. */
export function MaterialsScreen() {
  const { production } = useSession();
  const [search, setSearch] = useState('');
  const materials = useQuery(queries.materials(production!.id));
  const wanted = search.trim().toLowerCase();
  return (
    <Page title="Materials" lead="Presets with their sources. A scene starts from one and may change its numbers.">
      <Caution />
      <View style={{ maxWidth: 420, width: '100%' }}>
        <Field label="Find a material" value={search} onChangeText={setSearch} placeholder="rubber, foam, gelatin …" />
      </View>
      <QueryState query={materials} loading="Fetching the materials …">
        {({ items }) => {
          const found = items.filter((m) => `${m.name} ${m.family}`.toLowerCase().includes(wanted));
          return found.length === 0 ? (
            <Empty title="No material has this in its name.">Try a shorter word, such as “foam”.</Empty>
          ) : (
            <>
              {found.map((m) => (
                <Row
                  key={m.id}
                  title={m.name}
                  note={`${m.family}. Poisson ${figures(m.poissonsRatio)}, ${figures(m.density)} kg/m³. ${m.source} (${m.status})`}
                  value={stressText(m.youngsModulus)}
                />
              ))}
            </>
          );
        }}
      </QueryState>
    </Page>
  );
}
