import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';
import {
  findPublishedSet,
  PUBLISHED_SETS,
  publishedSetKey,
} from '../../../shared-core/cosmology/publishedSets.ts';
import { change } from '../../../shared-core/study/edits.ts';
import { useApp } from '../../state/app.ts';
import { p0Texts } from '../../strip/p0Text.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { NumberField } from '../../ui/NumberField.tsx';
import { P0_FIELD_ID } from '../../ui/openSections.ts';
import { Section } from '../../ui/Section.tsx';
import { useStudyPart } from '../useStudyPart.ts';
import { DerivedNumbers } from './DerivedNumbers.tsx';
import { OwnParameters } from './OwnParameters.tsx';

const OWN = 'own';

/** The universe that every distance, time and volume is computed in, and the P0 of effective volumes. */
export function CosmologySection() {
  const { studyState, derived } = useApp();
  const units = derived.units.value;
  const cosmology = useStudyPart('cosmology');
  const cosmologySet = useStudyPart('cosmologySet');
  const p0Mpc3PerH3 = useStudyPart('p0Mpc3PerH3');
  const set = PUBLISHED_SETS.find((one) => one.key === cosmologySet);
  const put = (parameters: CosmologyParameters, key: string | null, label: string): void => {
    studyState.perform(
      change(label, {
        cosmology: { ...parameters, neutrinoMassesEv: [...parameters.neutrinoMassesEv] },
        cosmologySet: key,
      }),
    );
  };
  return (
    <Section id="cosmology" title="Cosmology" gist={set?.name ?? 'own'}>
      <ChoiceField
        label="published set"
        value={set?.key ?? OWN}
        choices={[
          ...PUBLISHED_SETS.map(({ key, name }) => ({ value: key, label: name })),
          { value: OWN, label: 'own parameters', disabled: set !== undefined },
        ]}
        onChoose={(key) => {
          if (key === OWN) return;
          const chosen = findPublishedSet(key);
          put(chosen.parameters, chosen.key, `Cosmology ${chosen.name}`);
        }}
      />
      {set === undefined ? (
        <p class="quiet">Own parameters: any change below a published set makes them own.</p>
      ) : (
        <p class="quiet">
          {set.paper}; {set.table}.
        </p>
      )}
      <OwnParameters
        parameters={cosmology}
        onChange={(parameters, label) => put(parameters, publishedSetKey(parameters), label)}
      />
      <DerivedNumbers />
      <NumberField
        label="P₀ of the FKP weight"
        inputId={P0_FIELD_ID}
        unit="(Mpc/h)³"
        value={p0Mpc3PerH3}
        hint={`The power at which effective volume and redshift are taken: ${p0Texts(p0Mpc3PerH3, units)[1]}.`}
        onCommit={(p0) => {
          if (p0 === null || !(p0 > 0)) return `P₀ is ${p0}: give a power above 0, such as 10000.`;
          studyState.perform(change(`P₀ ${p0}`, { p0Mpc3PerH3: p0 }));
          return null;
        }}
      />
    </Section>
  );
}
