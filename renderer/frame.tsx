import { useSignalEffect } from '@preact/signals';
import { useDrop } from './drop.ts';
import { useKeys } from './keys.ts';
import { DeskPanel } from './panels/DeskPanel.tsx';
import { HeadBar } from './panels/HeadBar.tsx';
import { Notices } from './panels/Notices.tsx';
import { QuestionDialog } from './panels/QuestionDialog.tsx';
import { WorthPanel } from './panels/WorthPanel.tsx';
import { Stage } from './stage/Stage.tsx';
import { useApp } from './state/app.ts';
import { DepthStrip } from './strip/DepthStrip.tsx';
import { InTurn } from './ui/InTurn.tsx';

/** The window: head on top; catalogue, region and cosmology at the left; cone and strip; ledger and sheet. */
export function Frame() {
  const app = useApp();
  useKeys(app);
  useDrop(app);
  useSignalEffect(() => {
    document.documentElement.dataset.theme = app.view.theme.value;
  });
  return (
    <div class="frame">
      <header class="head">
        <HeadBar />
      </header>
      <aside class="desk" aria-label="Catalogue, region and cosmology">
        <InTurn>
          <DeskPanel />
        </InTurn>
      </aside>
      <main class="centre">
        <section class="stage" aria-label="The cone">
          {/* The cone's first picture follows in the frame after its place. */}
          <InTurn frames={3}>
            <Stage />
          </InTurn>
        </section>
        <section class="depth" aria-label="Depth strip">
          <InTurn>
            <DepthStrip />
          </InTurn>
        </section>
      </main>
      <aside class="worth" aria-label="Shell ledger and sheet">
        <InTurn>
          <WorthPanel />
        </InTurn>
      </aside>
      <Notices />
      <QuestionDialog />
    </div>
  );
}
