import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { View } from 'react-native';
import type { SceneDocument } from '../../shared/scene-document';
import { figures, massText, stressText } from '../../shared/units';
import { queries } from '../api/queries';
import { useSession } from '../api/session';
import { Button } from '../ui/button';
import { Card } from '../ui/card';
import { DimensionSlider } from '../ui/dimension-slider';
import { Fact } from '../ui/fact';
import { Row } from '../ui/row';
import { Sheet } from '../ui/sheet';
import { Caution } from '../ui/states';
import type { Edit } from './edit';

type Material = SceneDocument['materials'][number];

/** Materials of the body: a preset or numbers of one's own. */
export function MaterialCard({ document, edit, mass }: { document: SceneDocument; edit: Edit; mass: number | null }) {
  const [index, setIndex] = useState(0);
  const [choosing, setChoosing] = useState(false);
  const at = Math.min(index, document.materials.length - 1);
  const material = document.materials[at]!;
  const set = (kind: string, change: Partial<Material>) =>
    edit(`material-${kind}-${at}`, (d) => ({
      ...d,
      materials: d.materials.map((m, k) => (k === at ? { ...m, ...change } : m)),
    }));
  const E = material.youngsModulus;
  const low = Math.min(1e3, E / 10);
  const high = Math.max(1e6, E * 10);
  const kilo = (v: number) => figures(v / 1000);
  return (
    <Card
      title="Material"
      summary={document.materials.length === 1 ? 'one for the whole body' : `${document.materials.length} in this body`}
    >
      {document.materials.length > 1 ? (
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: 8 }}>
          {document.materials.map((m, k) => (
            <Button key={m.id} label={m.id} hint={m.name} pressed={k === at} onPress={() => setIndex(k)} />
          ))}
        </View>
      ) : null}
      <Row
        title={material.name}
        note={`${stressText(E)}, ${figures(material.density)} kg/m³, Poisson ${figures(material.poissonsRatio)}`}
        state={<Button kind="quiet" label="Change" hint="Choose a preset" onPress={() => setChoosing(true)} />}
      />
      <DimensionSlider
        label="Stiffness, Young’s modulus"
        value={E / 1000}
        min={low / 1000}
        max={high / 1000}
        step={0.1}
        scale="log"
        unit="kPa"
        format={(v) => kilo(v * 1000)}
        refuse={(v) => (v > 0 ? null : 'Stiffness must be greater than 0.')}
        onChange={(v) => set('stiffness', { youngsModulus: v * 1000 })}
      />
      <DimensionSlider
        label="Poisson’s ratio"
        hint="how little its volume gives"
        value={material.poissonsRatio}
        min={0}
        max={0.49}
        step={0.01}
        format={(v) => v.toFixed(2)}
        refuse={(v) =>
          v < 0
            ? 'Poisson’s ratio cannot be negative here.'
            : v >= 0.5
              ? 'At 0.5 nothing can change volume. Use 0.49 or less.'
              : null
        }
        onChange={(v) => set('poisson', { poissonsRatio: Number(v.toFixed(4)) })}
      />
      <DimensionSlider
        label="Density"
        value={material.density}
        min={10}
        max={Math.max(3000, material.density)}
        step={10}
        scale="log"
        unit="kg/m³"
        format={(v) => figures(v)}
        refuse={(v) => (v > 0 ? null : 'The density must be greater than 0.')}
        onChange={(v) => set('density', { density: v })}
      />
      <DimensionSlider
        label="Loss"
        hint="how soon a wobble dies, at 2 Hz"
        value={material.loss ?? 0}
        min={0}
        max={0.5}
        step={0.01}
        format={(v) => v.toFixed(2)}
        refuse={(v) =>
          v < 0
            ? 'Loss cannot be negative: nothing gains energy by moving.'
            : v > 1
              ? 'A loss factor above 1 is honey. Use 1 or less.'
              : null
        }
        onChange={(v) => set('loss', { loss: Number(v.toFixed(3)) })}
      />
      <Fact name="Mass of the body" value={mass === null ? '…' : massText(mass)} />
      {choosing ? (
        <PresetSheet
          onClose={() => setChoosing(false)}
          onChoose={(preset) => {
            set('preset', preset);
            setChoosing(false);
          }}
        />
      ) : null}
    </Card>
  );
}

function PresetSheet({ onClose, onChoose }: { onClose: () => void; onChoose: (material: Partial<Material>) => void }) {
  const { production } = useSession();
  const presets = useQuery(queries.materials(production!.id));
  return (
    <Sheet title="Choose a material" onClose={onClose}>
      <Caution />
      <View>
        {(presets.data?.items ?? []).map((p) => (
          <Row
            key={p.id}
            title={p.name}
            note={`${p.family}, Poisson ${figures(p.poissonsRatio)}, ${figures(p.density)} kg/m³`}
            value={stressText(p.youngsModulus)}
            label={`Use ${p.name}`}
            onPress={() =>
              onChoose({
                name: p.name,
                law: p.law,
                youngsModulus: p.youngsModulus,
                poissonsRatio: Math.min(0.49, p.poissonsRatio),
                density: p.density,
                preset: { id: p.id, version: p.version },
              })
            }
          />
        ))}
      </View>
    </Sheet>
  );
}
