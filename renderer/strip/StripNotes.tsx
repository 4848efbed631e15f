import { useApp } from '../state/app.ts';
import { depthAt, readBin } from './readBin.ts';
import type { StripRows } from './rows.ts';
import { profileWords, stripSentence } from './sentences.ts';
import type { StripModel } from './stripModel.ts';
import { depthTexts, profileSentence } from './words.ts';

/** What to know or do where there is nothing to draw. */
export function Sentence({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const app = useApp();
  const { empty: nothing, hint } = stripSentence(app);
  const empty = nothing ?? model.trouble.value;
  const scale = model.scale.value;
  if (scale === null) return null;
  const width = `${scale.rightPx - scale.leftPx}px`;
  return (
    <>
      {empty === null ? null : (
        <p
          class="strip-empty"
          style={{
            left: `${scale.leftPx}px`,
            width,
            top: `${rows.plotTop}px`,
            height: `${rows.plotBottom - rows.plotTop}px`,
          }}
        >
          <span>{empty}</span>
        </p>
      )}
      {hint === null ? null : (
        <p class="strip-hint" style={{ left: `${scale.leftPx}px`, width }}>
          {hint}
        </p>
      )}
    </>
  );
}

/** What is under the reading cursor. A screen reader hears it from the cursor itself. */
export function Tip({ model, rows }: { readonly model: StripModel; readonly rows: StripRows }) {
  const px = model.readPx.value;
  const scale = model.scale.value;
  if (px === null || scale === null) return null;
  const toLeft = px > (scale.leftPx + scale.rightPx) / 2;
  const side = toLeft ? { right: `calc(100% - ${px - 10}px)` } : { left: `${px + 10}px` };
  return (
    <div class="strip-tip" aria-hidden="true" style={{ ...side, top: `${rows.plotTop + 4}px` }}>
      <div class="strip-tip-depth">{depthAt(model, px)}</div>
      {readBin(model, px).map((text) => (
        <div key={text}>{text}</div>
      ))}
    </div>
  );
}

/** The values of the edge that is dragged, focused or pointed at. */
export function EdgeBubble({ model }: { readonly model: StripModel }) {
  const { studyState } = useApp();
  const index = model.spokenEdge.value;
  const scale = model.scale.value;
  const z = index === null ? undefined : studyState.study.value.edges[index];
  if (scale === null || z === undefined || model.typing.value !== null) return null;
  const x = scale.at(z);
  if (x < scale.leftPx - 1 || x > scale.rightPx + 1) return null;
  const width = model.size.value?.widthPx ?? 0;
  // Held inside the strip by its own width, which follows from the text: placed by share, it never overhangs.
  const share = width > 0 ? x / width : 0.5;
  return (
    <div
      class="strip-bubble"
      aria-hidden="true"
      style={{ left: `${x}px`, transform: `translateX(${-100 * share}%)` }}
    >
      {depthTexts(z, model.readings.value).map((text) => (
        <span key={text}>{text}</span>
      ))}
    </div>
  );
}

/** The histogram in a sentence, unseen. */
export function ProfileText({ model }: { readonly model: StripModel }) {
  const profile = model.profile.value;
  if (profile === null) return null;
  const { words, unit } = model.primary.value;
  return (
    <p class="unseen">{profileSentence(profileWords(profile), { words, unit }, profile.unit || 'per bin')}</p>
  );
}
