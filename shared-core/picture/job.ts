import { z } from '../base/schema.ts';

/** Formats of a picture, by the ending of its file's name. */
export const PICTURE_FORMATS = ['png', 'svg', 'pdf'] as const;
export type PictureFormat = (typeof PICTURE_FORMATS)[number];
export const FILM_FORMATS = ['webm', 'mp4'] as const;
export type FilmFormat = (typeof FILM_FORMATS)[number];

/** Formats of what is drawn: a picture, or a film. */
export type DrawnFormat = PictureFormat | FilmFormat;

export const isFilmFormat = (format: string): format is FilmFormat =>
  FILM_FORMATS.some((name) => name === format);

/** What the command gives the page that draws for it. */
export const pictureJobSchema = z.strictObject({
  format: z.enum([...PICTURE_FORMATS, ...FILM_FORMATS]),
  /** Checked by the page again, as everything that comes from outside. */
  options: z.unknown(),
  /** What happens in a film, for the formats of films. */
  film: z.unknown().nullable(),
  /** Text of a study's file, or null for the demo. */
  study: z.string().nullable(),
  /** Where the page reads the catalogue; null when the study has none or makes its own. */
  catalogue: z.strictObject({ url: z.string(), name: z.string(), sizeBytes: z.number() }).nullable(),
});
export type PictureJob = z.infer<typeof pictureJobSchema>;

/** What the page tells the command while it works, and at the end. */
export const pictureNewsSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('progress'),
    stage: z.enum(['catalogue', 'picture']),
    fraction: z.number(),
  }),
  z.strictObject({ kind: z.literal('remark'), sentence: z.string().max(5000) }),
  z.strictObject({ kind: z.literal('done'), bytes: z.number() }),
  z.strictObject({ kind: z.literal('refused'), sentence: z.string().max(5000) }),
]);
export type PictureNews = z.infer<typeof pictureNewsSchema>;

/** Addresses of the page's talk with the command, below the place of the page. */
export const PICTURE_PATHS = { job: 'job', piece: 'piece', news: 'news' } as const;
