import { InTurn } from '../ui/InTurn.tsx';
import { ColumnsSection } from './columns/ColumnsSection.tsx';
import { CosmologySection } from './cosmology/CosmologySection.tsx';
import { CutsSection } from './cuts/CutsSection.tsx';
import { RegionSection } from './region/RegionSection.tsx';
import { SourceSection } from './source/SourceSection.tsx';
import './panels.css';
import './desk.css';
import './columns/preview.css';

/** What everything stands on: the catalogue, its columns and cuts, the region of sky, the cosmology. */
export function DeskPanel() {
  return (
    <div class="desk-panel">
      <InTurn>
        <SourceSection />
      </InTurn>
      <InTurn>
        <ColumnsSection />
        <CutsSection />
      </InTurn>
      <InTurn>
        <RegionSection />
      </InTurn>
      <InTurn>
        <CosmologySection />
      </InTurn>
    </div>
  );
}
