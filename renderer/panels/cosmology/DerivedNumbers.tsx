import { omegaMassiveNeutrinos } from '../../../shared-core/cosmology/expansion.ts';
import { formatNumber } from '../../../shared-core/report/quantity.ts';
import { useApp } from '../../state/app.ts';

/** What follows from the parameters: shown, not typed. */
export function DerivedNumbers() {
  const cosmology = useApp().derived.cosmology.value;
  // As Planck's papers quote the matter density: with the massive neutrinos inside.
  const withMassive = cosmology.parameters.omegaM0 + omegaMassiveNeutrinos(cosmology.parameters);
  const rows = [
    ['age today', formatNumber(cosmology.ageGyr(0), { decimals: 3 }), 'Gyr'],
    ['Ω dark energy', formatNumber(cosmology.omegaDe0, { significant: 5 }), ''],
    [
      'Ω curvature',
      formatNumber(Math.abs(cosmology.omegaK0) < 1e-12 ? 0 : cosmology.omegaK0, { significant: 3 }),
      '',
    ],
    ['Ω neutrinos', formatNumber(cosmology.omegaNu0, { significant: 3 }), ''],
    ['Ω photons', formatNumber(cosmology.omegaGamma0, { significant: 3 }), ''],
    ['Ω matter + neutrinos', formatNumber(withMassive, { significant: 5 }), ''],
  ] as const;
  return (
    <dl class="derived" aria-label="Derived">
      {rows.map(([name, text, unit]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>
            {text} <span class="unit">{unit}</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}
