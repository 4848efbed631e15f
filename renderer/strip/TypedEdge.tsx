import { useRef } from 'preact/hooks';
import { EdgeForm } from './EdgeForm.tsx';
import type { StripModel, Typing } from './stripModel.ts';

const FORM_WIDTH_PX = 300;

/** The small form over the strip that takes an exact place for an edge. */
export function TypedEdge({ model }: { readonly model: StripModel }) {
  const typing = model.typing.value;
  if (typing === null) return null;
  return (
    <TypedEdgeBox
      key={`${typing.kind} ${typing.kind === 'move' ? typing.index : ''}`}
      model={model}
      typing={typing}
    />
  );
}

function TypedEdgeBox({ model, typing }: { readonly model: StripModel; readonly typing: Typing }) {
  const box = useRef<HTMLDivElement>(null);
  const cameFrom = useRef(document.activeElement);
  const scale = model.scale.value;
  const close = (): void => {
    model.typing.value = null;
    const back = cameFrom.current;
    if (back instanceof HTMLElement || back instanceof SVGElement) if (back.isConnected) back.focus();
  };
  const x = scale === null ? 0 : scale.at(typing.z);
  const width = model.size.value?.widthPx ?? FORM_WIDTH_PX;
  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: Escape closes whatever in the box has the focus
    <div
      ref={box}
      class="strip-typed"
      style={{ left: `${Math.max(4, Math.min(width - FORM_WIDTH_PX - 4, x - FORM_WIDTH_PX / 2))}px` }}
      onKeyDown={(event) => {
        event.stopPropagation();
        if (event.key === 'Escape') close();
      }}
      onFocusOut={(event) => {
        const to = event.relatedTarget;
        if (to instanceof Node && !box.current?.contains(to)) model.typing.value = null;
      }}
    >
      <EdgeForm
        label={typing.kind === 'move' ? `Edge ${typing.index + 1}` : 'New edge'}
        typing={typing}
        readings={model.readings.value}
        takesFocus
        onDone={close}
      />
    </div>
  );
}
