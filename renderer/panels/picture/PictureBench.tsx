import { useEffect, useMemo, useState } from 'preact/hooks';
import type { PictureFormat } from '../../../shared-core/picture/job.ts';
import { useApp } from '../../state/app.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Dialog } from '../../ui/Dialog.tsx';
import { BenchField } from './BenchField.tsx';
import { choicesFor } from './benchState.ts';
import { ExportRow } from './ExportRow.tsx';
import { LabelsChoice } from './LabelsChoice.tsx';
import { LookChoice } from './LookChoice.tsx';
import { PreviewPane } from './PreviewPane.tsx';
import { type PictureChoices, VIEW_CHOICES } from './pictureChoices.ts';
import { PictureClient } from './pictureClient.ts';
import { memoryTrouble, pictureRemarks } from './pictureRemarks.ts';
import { readChoices } from './readChoices.ts';
import { SizeChoice } from './SizeChoice.tsx';
import { SlabChoice } from './SlabChoice.tsx';
import { usePictureExport } from './usePictureExport.ts';
import { usePictureFacts } from './usePictureFacts.ts';
import { usePicturePreview } from './usePicturePreview.ts';
import { WordsChoice } from './WordsChoice.tsx';
import './bench.css';

/** Composes the picture that will be exported, and shows it as it will be. */
export function PictureBench({ onClose }: { readonly onClose: () => void }) {
  const app = useApp();
  const client = useMemo(() => new PictureClient(), []);
  const kept = useMemo(() => choicesFor(app), [app]);
  const choices = kept.value;
  const change = (part: Partial<PictureChoices>): void => {
    kept.value = { ...kept.value, ...part };
  };
  const { facts, waiting } = usePictureFacts(app, client);
  const [room, setRoom] = useState<readonly [number, number] | null>(null);
  const [said, setSaid] = useState<string | null>(null);
  const { options, troubles } = readChoices(choices, windowPx());
  const shown = usePicturePreview(client, options, facts, room);
  const exporting = usePictureExport(app, client);
  useEffect(() => () => client.stop(), [client]);

  const general =
    troubles.get('') ??
    [...troubles.values()][0] ??
    waiting ??
    shown.trouble ??
    memoryTrouble(app.engine.selected.value?.sample.count ?? 0, deviceGb());
  const hindered: Readonly<Record<PictureFormat, string | null>> = {
    png: general,
    svg: general,
    pdf: general ?? shown.preview?.pdfTrouble ?? null,
  };
  return (
    <Dialog title="Picture" kind="wide" lightDismiss={false} onClose={onClose}>
      <div class="bench">
        <PreviewPane
          shown={shown}
          sizeText={options === null ? 'No size yet' : `${options.widthPx} × ${options.heightPx} pixels`}
          waiting={waiting}
          ground={choices.style}
          onRoom={setRoom}
          onCopied={setSaid}
        />
        <div class="bench-right">
          <section class="bench-choices" aria-label="Choices">
            <ChoiceField
              label="View"
              value={choices.view}
              choices={VIEW_CHOICES}
              onChoose={(view) => change({ view: view as PictureChoices['view'] })}
            />
            <SlabChoice choices={choices} troubles={troubles} onChange={change} />
            <BenchField
              label="Ends at redshift (empty: shows everything)"
              value={choices.depthRedshift}
              field="depthRedshift"
              troubles={troubles}
              onInput={(depthRedshift) => change({ depthRedshift })}
            />
            <SizeChoice choices={choices} troubles={troubles} onChange={change} />
            <LookChoice choices={choices} onChange={change} />
            <WordsChoice
              choices={choices}
              studyName={app.studyState.study.value.name}
              offeredCaption={shown.preview?.offeredCaption ?? ''}
              onChange={change}
            />
            <LabelsChoice labels={choices.labels} troubles={troubles} onChange={change} />
          </section>
          <ExportRow
            state={exporting.state}
            hindered={hindered}
            remarks={options === null ? [] : pictureRemarks(options, app.derived.shells.value)}
            said={said}
            onExport={(format) => {
              if (options !== null) void exporting.start(format, options);
            }}
            onCancel={exporting.cancel}
          />
        </div>
      </div>
    </Dialog>
  );
}

const windowPx = (): readonly [number, number] => [
  Math.round(innerWidth * devicePixelRatio),
  Math.round(innerHeight * devicePixelRatio),
];

/** Only some browsers tell. */
const deviceGb = (): number | undefined => (navigator as { deviceMemory?: number }).deviceMemory;
