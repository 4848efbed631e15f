import { freemem, homedir, totalmem } from 'node:os';
import { basename, extname, join } from 'node:path';
import type { Command } from 'commander';
import { Refusal } from '../../../shared-core/base/refusal.ts';
import { checkFilmSize } from '../../../shared-core/picture/film.ts';
import { FILM_FORMATS, PICTURE_FORMATS, type PictureJob } from '../../../shared-core/picture/job.ts';
import { readStudy } from '../../../shared-core/study/document.ts';
import type { Study } from '../../../shared-core/study/schema.ts';
import { FileHistory } from '../../files/history.ts';
import { locateSource } from '../../files/locateSource.ts';
import { userFolder } from '../../files/userFolder.ts';
import { findBrowser } from '../../launch/findBrowser.ts';
import { fromHere, readableSize, readTextFile } from '../files.ts';
import { outputPlaces } from '../outputPlaces.ts';
import { addFilmOptions, type FilmWishes, filmOf, filmWork } from '../picture/filmWishes.ts';
import { makePicture } from '../picture/makePicture.ts';
import { checkMemory, neededBytes, obtainableBytes } from '../picture/memory.ts';
import { addPictureOptions, type PictureWishes, pictureOf } from '../picture/pictureWishes.ts';

interface PictureVerbOptions extends PictureWishes, FilmWishes {
  output: string;
  catalogue?: string;
  overwrite?: true;
}

const DEMO = 'demo';

/** conewright picture: a study as a picture worth printing, or as a film. */
export function addPicture(program: Command, say: (text: string) => void, windowFolder: string | null): void {
  const verb = program
    .command('picture')
    .argument('<study>', 'study file, or demo for the invented survey')
    .description('draw a study as PNG, SVG or PDF, or film it as WebM or MP4')
    .requiredOption(
      '-o, --output <file>',
      'file to write; its ending says the format: .png, .svg or .pdf, for a film .webm or .mp4',
    );
  addPictureOptions(verb)
    .option('--catalogue <file>', "the study's catalogue, where it was moved")
    .option('--overwrite', 'replace a picture that exists');
  addFilmOptions(verb)
    .addHelpText(
      'after',
      '\nExamples:\n  npm run -s conewright -- picture demo -o cone.png --size 7680x4320\n  npm run -s conewright -- picture demo -o cone.webm --film turntable --seconds 12 --fps 30',
    )
    .action(async (file: string, options: PictureVerbOptions) => {
      const format = formatOf(options.output);
      const film = filmOf(format, options);
      const wanted = pictureOf(options, film === null ? '4k' : '1920x1080');
      const text = file === DEMO ? null : await readTextFile(file, 'a study');
      const catalogue =
        text === null ? null : await catalogueOf(readStudy(text), fromHere(file), options, say);
      const { '--output': path } = await outputPlaces(
        { '--output': options.output },
        [...(text === null ? [] : [file]), ...(catalogue === null ? [] : [catalogue.path])],
        { overwrite: options.overwrite === true },
      );
      const obtainable = obtainableBytes(process.platform, freemem(), totalmem());
      if (film !== null) checkFilmSize(wanted.widthPx, wanted.heightPx);
      const needed = neededBytes(catalogue?.sizeBytes ?? 0, film === null ? null : wanted);
      checkMemory(film === null ? 'picture' : 'film', needed, obtainable);
      if (film !== null) say(filmWork(film, wanted, needed));
      const browser = findBrowser({ platform: process.platform, env: process.env, homeFolder: homedir() });
      if (browser === null)
        throw new Refusal(
          'No Chromium, Chrome or Edge was found, which draws the pictures: install one, or name it in CHROME_PATH.',
        );
      if (windowFolder === null)
        throw new Refusal(
          'The window is not built, which draws the pictures: start this by npm run conewright.',
        );
      await makePicture({
        browser,
        windowFolder,
        job: { format, options: wanted, film, study: text },
        catalogue,
        path,
        overwrite: options.overwrite === true,
        say,
      });
      say(`Written: ${options.output}, ${wanted.widthPx} x ${wanted.heightPx} pixels.`);
    });
}

function formatOf(output: string): PictureJob['format'] {
  const ending = extname(output).slice(1).toLowerCase();
  const format = [...PICTURE_FORMATS, ...FILM_FORMATS].find((name) => name === ending);
  if (format === undefined)
    throw new Refusal(
      `The picture's file is ${output}, expected an ending .png, .svg or .pdf, or .webm or .mp4 for a film.`,
      'use',
    );
  return format;
}

/** The file that the study was made from: as named on the command line, else where the study may be trusted. */
async function catalogueOf(
  study: Study,
  studyPath: string,
  { catalogue }: PictureVerbOptions,
  say: (text: string) => void,
): Promise<{ path: string; name: string; sizeBytes: number } | null> {
  if (study.source?.kind !== 'file') return null;
  const own = userFolder({ platform: process.platform, env: process.env, homeFolder: homedir() });
  const history = new FileHistory(own, join(own, 'locks'), say);
  const path =
    catalogue === undefined
      ? await locateSource({ ...study.source, studyId: null }, studyPath, history)
      : fromHere(catalogue);
  if (path === null)
    throw new Refusal(
      `The study's catalogue ${study.source.name} is not beside the study: put it there, or name it with --catalogue.`,
    );
  return { path, name: basename(path), sizeBytes: await readableSize(path) };
}
