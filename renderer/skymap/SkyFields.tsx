import { useApp } from '../state/app.ts';
import { fieldIndex, placeText, type SkyContent } from './skyContent.ts';
import { outlineProjection, type SkyFrame } from './skyProjection.ts';

/** Fields smaller than this on the map get a ring around them, to be found at all. */
const FINDABLE_PX = 5;
const REACH_PX = 12;

/** The fields on the map of the whole sky: choosing one looks at it. */
export function SkyFields({ frame, content }: { readonly frame: SkyFrame; readonly content: SkyContent }) {
  const { view } = useApp();
  const { fields } = content;
  if (fields.length === 0 || fields[0]!.wide) return null;
  const project = outlineProjection(frame);
  const looked = fieldIndex(fields, view.field.value);
  const single = fields.length === 1;
  return (
    <g>
      {fields.map((field, index) => {
        const [x, y] = project([field.centreRaDeg, field.centreDecDeg])!;
        const radius = 2 * Math.sin((field.radiusDeg * Math.PI) / 360) * frame.scalePx;
        const ring = Math.max(FINDABLE_PX, radius + 3);
        const shape = (
          <>
            <circle class="sky-field-reach" cx={x} cy={y} r={Math.max(REACH_PX, ring)} />
            {radius < FINDABLE_PX || !single ? (
              <circle class="sky-field-ring" cx={x} cy={y} r={ring} />
            ) : null}
            {single ? null : (
              <text x={x + ring + 3} y={y} dy="0.35em">
                {index + 1}
              </text>
            )}
          </>
        );
        if (single) return <g key={index}>{shape}</g>;
        const choose = (): void => void (view.field.value = index);
        return (
          // biome-ignore lint/a11y/useSemanticElements: there are no buttons in a drawing
          <g
            key={index}
            class={index === looked ? 'sky-field sky-field-looked' : 'sky-field'}
            role="button"
            tabindex={0}
            aria-pressed={index === looked}
            aria-label={`Field ${index + 1}, ${placeText(field.centreRaDeg, field.centreDecDeg, 1)}`}
            onClick={choose}
            onKeyDown={(event) => {
              if (event.key !== 'Enter' && event.key !== ' ') return;
              event.preventDefault();
              choose();
            }}
          >
            {shape}
          </g>
        );
      })}
    </g>
  );
}
