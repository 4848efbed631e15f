import { notAtHand } from '../panels/notAtHand.ts';
import { useApp } from '../state/app.ts';

/** Where galaxies are looked for: that their catalogue is not at hand, and the way to it. */
export function MissingCatalogue() {
  const app = useApp();
  const sentence = notAtHand(app);
  if (sentence === null) return null;
  return (
    <div class="stage-missing" role="status">
      <p>{sentence}</p>
      <button type="button" class="button accent-button" onClick={() => void app.files.pointAtSource()}>
        Point at it…
      </button>
    </div>
  );
}
