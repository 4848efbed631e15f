import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Segments } from '../../ui/Segments.tsx';
import type { MappingDraft } from './mappingDraft.ts';

const NONE = '';

/** Which column is what. */
export function MappingForm(props: {
  readonly header: readonly string[];
  readonly draft: MappingDraft;
  readonly sentence: string | null;
  readonly onChange: (draft: MappingDraft) => void;
}) {
  const { header, draft, sentence, onChange } = props;
  const columns = header.filter((name) => name !== '').map((name) => ({ value: name, label: name }));
  const select = (
    label: string,
    key: 'ra' | 'dec' | 'radialColumn' | 'weight' | 'magnitude' | 'id',
    none: string,
  ) => (
    <ChoiceField
      label={label}
      value={draft[key] ?? NONE}
      choices={[{ value: NONE, label: none }, ...columns]}
      onChoose={(name) => onChange({ ...draft, [key]: name === NONE ? null : name })}
    />
  );
  const needed = 'choose…';
  return (
    <div class="mapping">
      {select('right ascension, deg', 'ra', needed)}
      {select('declination, deg', 'dec', needed)}
      {select(draft.radialKind === 'redshift' ? 'redshift' : 'velocity cz, km/s', 'radialColumn', needed)}
      <Segments
        label="What the radial column holds"
        value={draft.radialKind}
        choices={[
          { value: 'redshift', label: 'z' },
          {
            value: 'czKmS',
            label: 'cz, km/s',
            title: 'A velocity, read as z = cz/c (the optical convention)',
          },
        ]}
        onChoose={(radialKind) => onChange({ ...draft, radialKind })}
      />
      {select('weight', 'weight', 'none: each counts 1')}
      {select('magnitude', 'magnitude', 'none')}
      {select('name', 'id', 'none')}
      {sentence === null ? null : (
        <p class="field-trouble" role="alert">
          {sentence}
        </p>
      )}
    </div>
  );
}
