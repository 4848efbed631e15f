import { useComputed, useSignal } from '@preact/signals';
import { geoPath } from 'd3-geo';
import { useRef } from 'preact/hooks';
import { useApp } from '../state/app.ts';
import { Segments } from '../ui/Segments.tsx';
import { smallTypePx } from '../ui/smallType.ts';
import { useBoxSize } from '../ui/useBoxSize.ts';
import { graticule } from './graticule.ts';
import { outlineArea, outlineLines } from './outlines.ts';
import { SkyFields } from './SkyFields.tsx';
import { SkyPoints } from './SkyPoints.tsx';
import { closeTarget, fieldIndex, middleOf, placeText, skyContent, skySentence } from './skyContent.ts';
import { closeFrame, type MapBox, wholeSkyFrame } from './skyFrames.ts';
import { outlineProjection, type SkyFrame, skyAt } from './skyProjection.ts';
import './skymap.css';

type Look = 'whole' | 'fit';

/** The sample and its region on the sky, in projections that keep areas; right ascension grows to the left. */
export function SkyMap() {
  const { engine, view } = useApp();
  const box = useRef<HTMLDivElement>(null);
  const size = useSignal<{ widthPx: number; heightPx: number; fontPx: number } | null>(null);
  const chosen = useSignal<Look | null>(null);
  const pointed = useSignal<string | null>(null);
  const content = useComputed(() => skyContent(engine.footprint.value));
  const middle = useComputed(() => middleOf(content.value, engine.selected.value));
  const target = useComputed(() => closeTarget(content.value, view.field.value, engine.selected.value));
  const look = useComputed<Look>(() => {
    if (target.value === null) return 'whole';
    return chosen.value ?? (content.value.fields.length > 1 ? 'whole' : 'fit');
  });
  useBoxSize(box, (widthPx, heightPx) => {
    size.value = { widthPx, heightPx: Math.round(heightPx), fontPx: smallTypePx() };
  });

  const map = useComputed(() => {
    if (size.value === null) return null;
    const { widthPx, heightPx, fontPx } = size.value;
    const whole = look.value === 'whole' || target.value === null;
    const inner: MapBox = whole
      ? { left: 3 * fontPx, top: 2, right: widthPx - 2, bottom: heightPx - 2 }
      : { left: 3.3 * fontPx, top: 2, right: widthPx - 2, bottom: heightPx - 1.5 * fontPx };
    const frame = whole ? wholeSkyFrame(inner, middle.value) : closeFrame(inner, target.value!);
    return { frame, box: inner, whole, ...drawn(frame, inner, fontPx, content.value) };
  });
  const { fields, origin } = content.value;
  const shown = map.value;
  const where = origin === null ? null : origin === 'estimated' ? 'estimate' : 'region';
  return (
    <figure class="sky-map">
      <div class="sky-head">
        <span class="sky-name" aria-hidden="true">
          Map
        </span>
        <Segments
          label="Map"
          value={look.value}
          disabled={target.value === null}
          choices={[
            { value: 'whole', label: 'whole sky', title: 'Show the whole sky' },
            { value: 'fit', label: 'field', title: 'Show the field that is looked at, as large as it fits' },
          ]}
          onChoose={(next) => void (chosen.value = next)}
        />
        <span class="sky-where">
          {fields.length > 1 ? `field ${fieldIndex(fields, view.field.value) + 1} of ${fields.length}` : null}
        </span>
      </div>
      <div class="sky-box" ref={box}>
        {shown === null || size.value === null ? null : (
          <>
            <svg aria-hidden="true" focusable="false" width={size.value.widthPx} height={size.value.heightPx}>
              <Ground shown={shown} />
            </svg>
            <SkyPoints frame={shown.frame} box={shown.box} size={size.value} />
            {/* biome-ignore lint/a11y/useSemanticElements: there are no fieldsets in a drawing */}
            <svg
              width={size.value.widthPx}
              height={size.value.heightPx}
              role="group"
              aria-label="Sky map"
              onPointerMove={(event) => void (pointed.value = placeUnder(event, shown.frame, shown.box))}
              onPointerLeave={() => void (pointed.value = null)}
            >
              <Outline shown={shown} estimated={origin === 'estimated'} />
              {shown.whole ? <SkyFields frame={shown.frame} content={content.value} /> : null}
            </svg>
          </>
        )}
      </div>
      <figcaption>
        <span class="unseen">{skySentence(content.value, engine.selected.value?.raDeg.length ?? 0)}</span>
        <span class="sky-key">
          {where === null ? null : (
            <>
              <svg class="sky-swatch" aria-hidden="true" viewBox="0 0 20 8">
                <line
                  class={origin === 'estimated' ? 'sky-outline sky-estimate' : 'sky-outline'}
                  x1="0"
                  x2="20"
                  y1="4"
                  y2="4"
                />
              </svg>
              {where}
            </>
          )}
        </span>
        <span class="sky-pointed">
          {pointed.value ?? (shown?.whole === false ? 'Lambert, equal area' : 'Hammer, equal area')}
        </span>
      </figcaption>
    </figure>
  );
}

type Drawn = ReturnType<typeof drawn> & { readonly box: MapBox; readonly whole: boolean };

/** The paths of everything but the points. */
function drawn(frame: SkyFrame, box: MapBox, fontPx: number, content: ReturnType<typeof skyContent>) {
  const projection = outlineProjection(frame);
  if (frame.kind === 'lambert')
    projection.clipAngle(150).clipExtent([
      [box.left, box.top],
      [box.right, box.bottom],
    ]);
  const path = geoPath(projection);
  const fields = content.fields.filter((field) => !field.wide);
  const marks = fields.map((field) => projection([field.centreRaDeg, field.centreDecDeg])!);
  const lines = graticule(frame, box, fontPx, marks);
  const all = content.origin !== null && content.rings.length === 0;
  return {
    rim: frame.kind === 'hammer' ? path({ type: 'Sphere' }) : null,
    graticule: path(lines.lines),
    labels: lines.labels,
    area: content.origin === null ? null : path(all ? { type: 'Sphere' } : outlineArea(content.rings)),
    outline: content.origin === null ? null : path(all ? { type: 'Sphere' } : outlineLines(content.rings)),
  };
}

/** What lies under the points. */
function Ground({ shown: { box, rim, graticule: lines, area } }: { readonly shown: Drawn }) {
  return (
    <>
      {rim === null ? (
        <rect
          class="sky-rim"
          x={box.left}
          y={box.top}
          width={box.right - box.left}
          height={box.bottom - box.top}
        />
      ) : (
        <path class="sky-rim" d={rim} />
      )}
      <path class="sky-graticule" d={lines ?? ''} />
      <path class="sky-area" d={area ?? ''} />
    </>
  );
}

/** What lies over them. */
function Outline({ shown, estimated }: { readonly shown: Drawn; readonly estimated: boolean }) {
  return (
    // biome-ignore lint/a11y/noAriaHiddenOnFocusable: nothing in this group takes the focus
    <g aria-hidden="true">
      <path class={estimated ? 'sky-outline sky-estimate' : 'sky-outline'} d={shown.outline ?? ''} />
      {shown.labels.map((label) => (
        <text key={`${label.text} ${label.anchor}`} x={label.x} y={label.y} text-anchor={label.anchor}>
          {label.text}
        </text>
      ))}
    </g>
  );
}

function placeUnder(
  event: PointerEvent & { readonly currentTarget: SVGSVGElement },
  frame: SkyFrame,
  box: MapBox,
) {
  const corner = event.currentTarget.getBoundingClientRect();
  const [x, y] = [event.clientX - corner.left, event.clientY - corner.top];
  if (frame.kind === 'lambert' && (x < box.left || x > box.right || y < box.top || y > box.bottom))
    return null;
  const at = skyAt(frame, x, y);
  // As many decimals as the pixel tells.
  const decimals = Math.max(0, Math.min(6, Math.ceil(-Math.log10(57.3 / frame.scalePx))));
  return at === null ? null : placeText(at.raDeg, at.decDeg, decimals);
}
