import { type ReadonlySignal, useComputed, useSignal, useSignalEffect } from '@preact/signals';
import { useLayoutEffect, useRef } from 'preact/hooks';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { roundTo } from '../../shared-core/base/roundTo.ts';
import type { Cosmology } from '../../shared-core/cosmology/cosmology.ts';
import {
  DISTANCE_QUANTITIES,
  type DistanceRow,
  distanceRows,
} from '../../shared-core/report/distanceQuantities.ts';
import { formatNumber, shownText, shownUnit } from '../../shared-core/report/quantity.ts';
import type { GalaxyHit } from '../cone/types.ts';
import type { GalaxyRow } from '../engine/protocol.ts';
import { useApp } from '../state/app.ts';
import { IconButton } from '../ui/IconButton.tsx';
import { Subscripted } from '../ui/Subscripted.tsx';
import { unitText } from '../ui/unitText.ts';
import { type Corner, cardCorner, pairPoints } from './cardCorner.ts';
import type { Picks } from './picking.ts';
import { pickedSeparation } from './separationText.ts';
import { useRowName } from './useRowName.ts';

const SHOWN = ['comovingMpc', 'luminosityMpc', 'angularDiameterMpc', 'lookbackGyr', 'ageGyr'];

/** What is known of the galaxy under the pointer, or of the ones picked. */
export function GalaxyCard({
  hovered,
  picks,
}: {
  readonly hovered: ReadonlySignal<GalaxyHit | null>;
  readonly picks: ReadonlySignal<Picks>;
}) {
  const app = useApp();
  const { engine, derived, view } = app;
  const index = useComputed(() => hovered.value?.index ?? view.pickedGalaxies.value.at(-1) ?? null);
  const row = useSignal<GalaxyRow | null>(null);
  useSignalEffect(() => {
    const asked = index.value;
    // Asked anew once the column of the colours is there: its number is told as well.
    void engine.columns.value;
    if (asked === null || engine.selected.value === null) {
      row.value = null;
      return;
    }
    engine.client.row(asked).then(
      (found) => {
        if (index.peek() === asked) row.value = found;
      },
      () => (row.value = null),
    );
  });
  const name = useRowName(row);
  const picked = view.pickedGalaxies.value.length;
  const marked = picks.value;
  const card = useRef<HTMLElement>(null);
  const corner = useSignal<Corner>('bottom-right');
  useLayoutEffect(() => {
    const stage = card.current?.parentElement?.querySelector('.stage-cone');
    if (card.current === null || stage == null) return;
    // With a galaxy picked the card stays for the pointer that comes to it; without, it makes way for the pointer.
    const points = picked > 0 ? pairPoints(marked) : hovered.value === null ? [] : [hovered.value];
    corner.value = cardCorner(points, sizeOf(stage), sizeOf(card.current, MARGIN_PX), corner.value);
  });
  const galaxy = row.value;
  if (galaxy === null) return null;
  const units = derived.units.value;
  const distances = distancesAt(derived.cosmology.value, galaxy.redshift);
  // The pointer still is on the galaxy that it has picked.
  const seesPair = hovered.value === null || view.pickedGalaxies.value.includes(hovered.value.index);
  const apart = seesPair ? pickedSeparation(app) : null;
  const length = (mpc: number) =>
    `${formatNumber(mpc * (units.perH ? units.h : 1), { significant: 5 })} ${units.perH ? 'Mpc/h' : 'Mpc'}`;
  return (
    <section
      ref={card}
      class={`galaxy-card galaxy-card-${corner.value}`}
      aria-label="Galaxy pointed at"
      aria-live="polite"
    >
      <header>
        <strong>{name ?? `Row at line ${galaxy.line}`}</strong>
        {picked > 0 ? (
          <IconButton
            icon="close"
            label="Let the galaxy go"
            onClick={() => {
              view.pickedGalaxies.value = [];
              view.measuring.value = false;
            }}
          />
        ) : null}
      </header>
      {picked > 0 ? (
        <button
          type="button"
          class="button"
          aria-pressed={view.measuring.value}
          title="The next click on a galaxy measures to it, as Shift-click does"
          onClick={() => (view.measuring.value = !view.measuring.value)}
        >
          {view.measuring.value ? 'Click a galaxy; Esc ends' : 'Measure to another'}
        </button>
      ) : null}
      {/* While another is looked for, the card is out of the way but for its name. */}
      {view.measuring.value ? null : (
        <dl>
          {name === null ? null : (
            <>
              <dt>line</dt>
              <dd>{galaxy.line}</dd>
            </>
          )}
          <dt>RA, Dec</dt>
          <dd>
            {galaxy.raDeg.toFixed(5)}°, {galaxy.decDeg.toFixed(5)}°
          </dd>
          <dt>z</dt>
          <dd>{String(roundTo(galaxy.redshift, 8))}</dd>
          {DISTANCE_QUANTITIES.filter((q) => distances !== null && SHOWN.includes(q.key)).map((q) => (
            <>
              <dt>
                <Subscripted text={q.title} />
              </dt>
              <dd>
                {shownText(q, distances!, units)} {unitText(shownUnit(q, units))}
              </dd>
            </>
          ))}
          {galaxy.magnitude === null ? null : (
            <>
              <dt>magnitude</dt>
              <dd>{Number.isFinite(galaxy.magnitude) ? String(galaxy.magnitude) : 'not given'}</dd>
            </>
          )}
          {galaxy.weight === null ? null : (
            <>
              <dt>weight</dt>
              <dd>{String(galaxy.weight)}</dd>
            </>
          )}
          {galaxy.extras.map(([name, value]) => (
            <>
              <dt>{name}</dt>
              <dd>{Number.isFinite(value) ? String(value) : 'not given'}</dd>
            </>
          ))}
        </dl>
      )}
      {apart === null ? null : (
        <dl class="galaxy-apart">
          <dt>apart</dt>
          <dd>{length(apart.totalMpc)}</dd>
          <dt>along the line of sight</dt>
          <dd>{length(apart.alongMpc)}</dd>
          <dt>across it</dt>
          <dd>{length(apart.acrossMpc)}</dd>
          <dt>on the sky</dt>
          <dd>{formatNumber(apart.angleDeg, { significant: 4 })}°</dd>
        </dl>
      )}
    </section>
  );
}

/** The card stands this far from the sides of the stage, as in stage.css. */
const MARGIN_PX = 12;

function sizeOf(element: Element, morePx = 0) {
  const { width, height } = element.getBoundingClientRect();
  return { widthPx: width + morePx, heightPx: height + morePx };
}

// A strongly closed universe has no distances beyond its far side.
function distancesAt(cosmology: Cosmology, redshift: number): DistanceRow | null {
  try {
    return distanceRows(cosmology, [redshift])[0] ?? null;
  } catch (error) {
    if (error instanceof Refusal) return null;
    throw error;
  }
}
