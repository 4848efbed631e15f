import { useState } from 'preact/hooks';
import { roundTo } from '../../../shared-core/base/roundTo.ts';
import type { CosmologyParameters } from '../../../shared-core/cosmology/parameters.ts';
import { useApp } from '../../state/app.ts';
import { DraftField } from '../../ui/DraftField.tsx';
import { NumberField } from '../../ui/NumberField.tsx';
import { Switch } from '../../ui/Switch.tsx';
import { NUMBER_FIELDS, type ParameterName, parameterTrouble, readMasses } from './parameterFields.ts';

/** Every parameter as a field. What makes no universe stays in its field with the reason, and is not applied. */
export function OwnParameters(props: {
  readonly parameters: CosmologyParameters;
  readonly onChange: (parameters: CosmologyParameters, label: string) => void;
}) {
  const { parameters, onChange } = props;
  const { derived } = useApp();
  const [elsewhere, setElsewhere] = useState<{
    field: ParameterName;
    sentence: string;
    of: CosmologyParameters;
  } | null>(null);
  const flat = parameters.omegaDe0 === 'flat';

  /** @returns the reason when it belongs under the field itself; under another field it is shown there */
  const put = (field: ParameterName, next: CosmologyParameters, label: string): string | null => {
    const trouble = parameterTrouble(next);
    if (trouble !== null) {
      setElsewhere(trouble.field === field ? null : { ...trouble, of: parameters });
      return trouble.field === field
        ? trouble.sentence
        : `Not taken: see ${trouble.field === 'omegaDe0' ? 'dark energy' : 'the other parameter'}.`;
    }
    setElsewhere(null);
    onChange(next, label);
    return null;
  };
  const also = (field: ParameterName) =>
    elsewhere !== null && elsewhere.field === field && elsewhere.of === parameters ? (
      <p class="field-trouble" role="alert">
        {elsewhere.sentence}
      </p>
    ) : null;
  const numberField = ({ name, label, unit }: (typeof NUMBER_FIELDS)[number]) => (
    <div key={name}>
      <NumberField
        label={label}
        unit={unit}
        value={parameters[name]}
        onCommit={(value) => put(name, { ...parameters, [name]: value! }, `${label} ${value}`)}
      />
      {also(name)}
    </div>
  );
  const [h0, matter, ...rest] = NUMBER_FIELDS;
  return (
    <div class="parameters">
      {numberField(h0!)}
      {numberField(matter!)}
      <p class="field-hint parameters-whole">Matter is baryons and cold dark matter; neutrinos are added.</p>
      <div>
        <Switch
          label="flat: dark energy closes the sum"
          checked={flat}
          onChange={(on) => {
            const omegaDe0 = on ? ('flat' as const) : roundTo(derived.cosmology.value.omegaDe0, 6);
            put('omegaDe0', { ...parameters, omegaDe0 }, on ? 'Flat' : 'Not flat');
          }}
        />
        {parameters.omegaDe0 === 'flat' ? null : (
          <NumberField
            label="Ω dark energy"
            value={parameters.omegaDe0}
            onCommit={(value) =>
              put('omegaDe0', { ...parameters, omegaDe0: value! }, `Ω dark energy ${value}`)
            }
          />
        )}
        {also('omegaDe0')}
      </div>
      {rest.map(numberField)}
      <div>
        <Masses parameters={parameters} put={put} />
        {also('neutrinoMassesEv')}
      </div>
    </div>
  );
}

function Masses(props: {
  readonly parameters: CosmologyParameters;
  readonly put: (field: ParameterName, next: CosmologyParameters, label: string) => string | null;
}) {
  const { parameters, put } = props;
  const [draft, setDraft] = useState<{
    text: string;
    trouble: string | null;
    of: CosmologyParameters;
  } | null>(null);
  const now = parameters.neutrinoMassesEv.join(', ');
  const current = draft !== null && draft.of === parameters ? draft : { text: now, trouble: null };
  const commit = (): void => {
    if (current.text === now) {
      setDraft(null);
      return;
    }
    const masses = readMasses(current.text);
    const trouble =
      masses === null
        ? `The neutrino masses are "${current.text}": give masses in eV with commas between, such as 0, 0, 0.06.`
        : put('neutrinoMassesEv', { ...parameters, neutrinoMassesEv: masses }, 'Neutrino masses');
    setDraft(trouble === null ? null : { text: current.text, trouble, of: parameters });
  };
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: it only listens to what its field does
    <div
      onFocusOut={commit}
      onKeyDown={(e) => {
        if (e.key === 'Enter') commit();
        if (e.key === 'Escape' && draft !== null) {
          e.stopPropagation();
          e.preventDefault();
          setDraft(null);
        }
      }}
    >
      <DraftField
        label="neutrinos"
        unit="eV"
        value={current.text}
        trouble={current.trouble}
        onInput={(text) => setDraft({ text, trouble: null, of: parameters })}
      />
    </div>
  );
}
