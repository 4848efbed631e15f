import type { ComponentChildren } from 'preact';
import { BenchField } from './BenchField.tsx';
import type { PictureChoices } from './pictureChoices.ts';
import type { Troubles } from './readChoices.ts';

/** Width and height in pixels, and what else belongs beside them. */
export function OwnSize(props: {
  readonly choices: PictureChoices;
  readonly troubles: Troubles;
  readonly onChange: (part: Partial<PictureChoices>) => void;
  readonly children?: ComponentChildren;
}) {
  const { choices, troubles, onChange, children } = props;
  return (
    <div class="bench-row">
      <BenchField
        label="Width"
        unit="px"
        value={choices.ownWidthPx}
        field="ownWidthPx"
        troubles={troubles}
        onInput={(ownWidthPx) => onChange({ ownWidthPx })}
      />
      <BenchField
        label="Height"
        unit="px"
        value={choices.ownHeightPx}
        field="ownHeightPx"
        troubles={troubles}
        onInput={(ownHeightPx) => onChange({ ownHeightPx })}
      />
      {children}
    </div>
  );
}
