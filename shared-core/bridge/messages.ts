import { z } from '../base/schema.ts';

/** The largest study that is read or saved: far above any real one, small enough to hold in memory. */
export const LARGEST_STUDY_BYTES = 64 * 1024 * 1024;
/** The largest piece of an exported file that is sent at once. */
export const LARGEST_PIECE_BYTES = 8 * 1024 * 1024;

const text = z.string().max(4096);
/** An id that the host or the page made from random bytes. */
export const idSchema = z.string().regex(/^[A-Za-z0-9_-]{8,64}$/);
const bytesCount = z.int().min(0);
const millisecondsSince1970 = z.number().finite();
const sha256 = z.string().regex(/^[0-9a-f]{64}$/);
export const pathSchema = z
  .string()
  .min(1)
  .max(32_767)
  .refine((path) => !path.includes('\0'), 'holds a zero character');

/** What a file was like when it was read or saved: two equal fingerprints mean the same contents. */
export const fileStampSchema = z.strictObject({
  sizeBytes: bytesCount,
  modifiedMs: millisecondsSince1970,
  sha256,
});
export type FileStamp = z.infer<typeof fileStampSchema>;

/**
 * A file that the user gave to the program. `url` answers GET by streaming, and Range requests, in the page and in
 * its workers. `path` is for showing and for the study to remember; null where the browser does not tell it.
 */
export const openedFileSchema = z.strictObject({
  id: idSchema,
  name: text,
  sizeBytes: bytesCount,
  modifiedMs: millisecondsSince1970.nullable(),
  path: pathSchema.nullable(),
  url: z.string().min(1).max(8192),
});
export type OpenedFile = z.infer<typeof openedFileSchema>;

export const purposeSchema = z.enum(['catalogue', 'study', 'region']);
/** What a file is opened for: decides the dialog's title and which names it shows first. */
export type Purpose = z.infer<typeof purposeSchema>;

/** Where a study will be saved. `existing` is what stands there now, or null. */
export const saveTargetSchema = z.strictObject({
  id: idSchema,
  name: text,
  folder: pathSchema,
  existing: fileStampSchema.nullable(),
});
export type SaveTarget = z.infer<typeof saveTargetSchema>;

/**
 * saved: the file holds the new contents, and `stamp` is what to expect there next time.
 * conflict: something else stands there (`found`); nothing was written.
 * failed: nothing was written, the old file is untouched; `sentence` says why and what to do.
 */
export const saveOutcomeSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('saved'), stamp: fileStampSchema }),
  z.strictObject({ kind: z.literal('conflict'), found: fileStampSchema, sentence: text }),
  z.strictObject({ kind: z.literal('failed'), sentence: text }),
]);
export type SaveOutcome = z.infer<typeof saveOutcomeSchema>;

/** A source as a study remembers it, and the study (an OpenedFile or SaveTarget id) that names it. */
export const sourceReferenceSchema = z.strictObject({
  name: text,
  path: pathSchema.nullable(),
  sizeBytes: bytesCount.nullable(),
  studyId: idSchema.nullable(),
});
export type SourceReference = z.infer<typeof sourceReferenceSchema>;

export const recentStudySchema = z.strictObject({
  id: idSchema,
  name: text,
  folder: pathSchema,
  usedMs: millisecondsSince1970,
  /** False when the file is not there any more (moved, deleted, a disk not plugged in). */
  found: z.boolean(),
});
export type RecentStudy = z.infer<typeof recentStudySchema>;

export const unsavedWorkSchema = z.strictObject({
  workId: idSchema,
  title: text,
  keptMs: millisecondsSince1970,
  sizeBytes: bytesCount,
});
/** Work that was never saved and that no living window holds: to be offered back. */
export type UnsavedWork = z.infer<typeof unsavedWorkSchema>;

export const windowStateSchema = z.strictObject({ title: text, unsaved: z.boolean() });
export type WindowState = z.infer<typeof windowStateSchema>;

export const launchInfoSchema = z.strictObject({
  hostKind: z.enum(['desktop', 'local']),
  /** The folder that studies are saved into, in the local host; null where a dialog asks. */
  saveFolder: pathSchema.nullable(),
  files: z.array(openedFileSchema),
  /** A sentence for each named file that could not be opened. */
  troubles: z.array(text),
});
export type LaunchInfo = z.infer<typeof launchInfoSchema>;

export const menuCommandSchema = z.enum(['new', 'open', 'save', 'saveAs', 'export', 'undo', 'redo']);
/** What the desktop's menu asks the window to do. */
export type MenuCommand = z.infer<typeof menuCommandSchema>;

/** What a host tells a window without being asked. */
export const hostEventSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('command'), command: menuCommandSchema }),
  z.strictObject({ kind: z.literal('closeRequest') }),
]);
export type HostEvent = z.infer<typeof hostEventSchema>;
