import { useEffect, useMemo, useState } from 'preact/hooks';
import { filmFrames, waitText } from '../../../shared-core/picture/film.ts';
import type { DrawnFormat } from '../../../shared-core/picture/job.ts';
import { drawingBytes, memoryText } from '../../../shared-core/picture/memory.ts';
import { offeredTitle } from '../../picture/caption.ts';
import { colourRemark } from '../../picture/numbers.ts';
import { useApp } from '../../state/app.ts';
import { ChoiceField } from '../../ui/ChoiceField.tsx';
import { Dialog } from '../../ui/Dialog.tsx';
import { Segments } from '../../ui/Segments.tsx';
import { fieldsInView } from '../fieldsInView.ts';
import { BenchField } from './BenchField.tsx';
import type { FilmForecast, FilmMoment } from './benchMessages.ts';
import { choicesFor } from './benchState.ts';
import { ExportRow } from './ExportRow.tsx';
import { FilmChoice } from './FilmChoice.tsx';
import { LabelsChoice } from './LabelsChoice.tsx';
import { LookChoice } from './LookChoice.tsx';
import { PreviewPane } from './PreviewPane.tsx';
import { type PictureChoices, VIEW_CHOICES } from './pictureChoices.ts';
import { PictureClient } from './pictureClient.ts';
import { memoryTrouble, pictureRemarks } from './pictureRemarks.ts';
import { type ReadPicture, readChoices } from './readChoices.ts';
import { SizeChoice } from './SizeChoice.tsx';
import { SlabChoice } from './SlabChoice.tsx';
import { usePictureExport } from './usePictureExport.ts';
import { usePictureFacts } from './usePictureFacts.ts';
import { usePicturePreview } from './usePicturePreview.ts';
import { WordsChoice } from './WordsChoice.tsx';
import './bench.css';

/** Composes the picture or the film that will be exported, and shows it, or a moment of it, as it will be. */
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
  const [frame, setFrame] = useState(0);
  const fields = fieldsInView(app);
  const field = Math.min(choices.field, Math.max(1, fields.length));
  const read = readChoices({ ...choices, field }, windowPx());
  const { options, film, troubles } = read;
  const isFilm = choices.what === 'film';
  const moment: FilmMoment | null =
    film === null ? null : { film, frame: Math.min(frame, filmFrames(film) - 1) };
  const shown = usePicturePreview(client, options, moment, facts, room);
  const exporting = usePictureExport(app, client);
  useEffect(() => () => client.stop(), [client]);

  const remarks = useMemo(() => {
    const colour = options && facts && colourRemark(options, facts);
    const others = options === null ? [] : pictureRemarks(options, app.derived.shells.value);
    return colour === null ? others : [colour, ...others];
  }, [JSON.stringify(options), facts, app.derived.shells.value]);
  const galaxies = app.engine.selected.value?.sample.count ?? 0;
  const needed = drawingBytes(galaxies, film === null ? null : options);
  const general =
    troubles.get('') ??
    [...troubles.values()][0] ??
    waiting ??
    shown.trouble ??
    memoryTrouble(isFilm ? 'The film' : 'The picture', needed, deviceGb());
  const { preview } = shown;
  const hindered: readonly (readonly [DrawnFormat, string | null])[] = isFilm
    ? [
        ['webm', general ?? preview?.forecast?.troubles.webm ?? null],
        ['mp4', general ?? preview?.forecast?.troubles.mp4 ?? null],
      ]
    : [
        ['png', general],
        ['svg', general],
        ['pdf', general ?? preview?.pdfTrouble ?? null],
      ];
  return (
    <Dialog title="Picture or film" kind="wide" lightDismiss={false} onClose={onClose}>
      <div class="bench">
        <PreviewPane
          shown={shown}
          sizeText={sizeText(read, needed, preview?.forecast ?? null)}
          moment={moment}
          onFrame={setFrame}
          waiting={waiting}
          ground={choices.style}
          onRoom={setRoom}
          onCopied={setSaid}
        />
        <div class="bench-right">
          <section class="bench-choices" aria-label="Choices">
            <Segments
              label="What to draw"
              value={choices.what}
              choices={[
                { value: 'picture', label: 'Picture' },
                { value: 'film', label: 'Film' },
              ]}
              onChoose={(what) => change({ what })}
            />
            {isFilm ? (
              <FilmChoice
                choices={choices}
                troubles={troubles}
                fields={fields.map((_, i) => `Field ${i + 1} of ${fields.length}`)}
                onChange={change}
              />
            ) : (
              <ChoiceField
                label="View"
                value={choices.view}
                choices={VIEW_CHOICES}
                onChoose={(view) => change({ view: view as PictureChoices['view'] })}
              />
            )}
            <SlabChoice choices={choices} troubles={troubles} onChange={change} />
            <BenchField
              label="Ends at redshift (empty: shows everything)"
              value={choices.depthRedshift}
              field="depthRedshift"
              troubles={troubles}
              onInput={(depthRedshift) => change({ depthRedshift })}
            />
            {isFilm ? null : <SizeChoice choices={choices} troubles={troubles} onChange={change} />}
            <LookChoice choices={choices} onChange={change} />
            <WordsChoice
              choices={choices}
              studyName={offeredTitle(app.studyState.study.value)}
              offeredCaption={shown.preview?.offeredCaption ?? ''}
              onChange={change}
            />
            <LabelsChoice labels={choices.labels} troubles={troubles} onChange={change} />
          </section>
          <ExportRow
            state={exporting.state}
            hindered={hindered}
            remarks={remarks}
            said={said}
            onExport={(format) => {
              if (options !== null) void exporting.start(format, options, film);
            }}
            onCancel={exporting.cancel}
          />
        </div>
      </div>
    </Dialog>
  );
}

/** How large it becomes; of a film also how much work it is. */
function sizeText(
  { options, film }: ReadPicture,
  neededBytes: number,
  forecast: FilmForecast | null,
): string {
  if (options === null) return 'No size yet';
  const pixels = `${options.widthPx} × ${options.heightPx} pixels`;
  if (film === null) return pixels;
  const frames = filmFrames(film);
  const time = forecast === null ? '' : ` · takes ${waitText(frames * forecast.secondsAFrame)}`;
  return `${pixels} · ${frames} frames${time} · ${memoryText(neededBytes)} of memory`;
}

const windowPx = (): readonly [number, number] => [
  Math.round(innerWidth * devicePixelRatio),
  Math.round(innerHeight * devicePixelRatio),
];

/** Only some browsers tell. */
const deviceGb = (): number | undefined => (navigator as { deviceMemory?: number }).deviceMemory;
