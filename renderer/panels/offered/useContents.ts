import { useEffect, useState } from 'preact/hooks';
import type { UnsavedWork } from '../../../shared-core/bridge/messages.ts';
import { readStudy } from '../../../shared-core/study/document.ts';
import { useApp } from '../../state/app.ts';

/** What a piece of work holds, for choosing among several. */
export interface Contents {
  readonly shells: string;
  readonly catalogue: string;
}

/** The contents of kept work by its id, as far as they have been looked at. */
export function useContents(works: readonly UnsavedWork[]): ReadonlyMap<string, Contents> {
  const { bridge } = useApp();
  const [known, setKnown] = useState<ReadonlyMap<string, Contents>>(new Map());
  useEffect(() => {
    let gone = false;
    const look = async (): Promise<void> => {
      for (const { workId } of works) {
        const found = await bridge
          .lookAtUnsaved(workId)
          .then(contentsOf)
          // Why it cannot be read is told to whoever takes it up.
          .catch(() => ({ shells: '–', catalogue: 'cannot be read' }));
        if (gone) return;
        setKnown((before) => new Map(before).set(workId, found));
      }
    };
    void look();
    return () => {
      gone = true;
    };
  }, []);
  return known;
}

function contentsOf(bytes: Uint8Array): Contents {
  const { edges, source } = readStudy(new TextDecoder().decode(bytes));
  return {
    shells: String(Math.max(0, edges.length - 1)),
    catalogue: source === null ? 'none' : source.kind === 'demo' ? 'the invented demo' : source.name,
  };
}
