import { Refusal } from '../base/refusal.ts';
import { z } from '../base/schema.ts';
import {
  fileStampSchema,
  idSchema,
  LARGEST_PIECE_BYTES,
  LARGEST_STUDY_BYTES,
  launchInfoSchema,
  openedFileSchema,
  pathSchema,
  purposeSchema,
  recentStudySchema,
  saveOutcomeSchema,
  saveTargetSchema,
  sourceReferenceSchema,
  unsavedWorkSchema,
  windowStateSchema,
} from './messages.ts';

const nothing = z.strictObject({});
const name = z.string().min(1).max(1024);
const sha256 = z.string().regex(/^[0-9a-f]{64}$/);

/**
 * Everything a window can ask of its host. `argument` and `answer` are checked on both sides; `bytes` is the most
 * bytes that may come with the argument. `from` says who may ask: a 'preload' call carries paths, which only the
 * desktop's preload script may name, because it has them from files that the user dropped.
 */
export const CALLS = {
  launch: { argument: nothing, answer: launchInfoSchema, bytes: 0, from: 'page' },
  openByDialog: {
    argument: z.strictObject({ purpose: purposeSchema }),
    answer: z.array(openedFileSchema),
    bytes: 0,
    from: 'page',
  },
  openDropped: {
    argument: z.strictObject({ paths: z.array(pathSchema).max(100) }),
    answer: z.array(openedFileSchema),
    bytes: 0,
    from: 'preload',
  },
  locateSource: {
    argument: sourceReferenceSchema,
    answer: openedFileSchema.nullable(),
    bytes: 0,
    from: 'page',
  },
  fingerprint: {
    argument: z.strictObject({ fileId: idSchema }),
    answer: fileStampSchema,
    bytes: 0,
    from: 'page',
  },
  /** Answers the study's bytes as well. */
  readStudy: {
    argument: z.strictObject({ fileId: idSchema }),
    answer: z.strictObject({ stamp: fileStampSchema, target: saveTargetSchema.nullable() }),
    bytes: 0,
    from: 'page',
  },
  /** The study in the save folder with this name and these contents, when a page picked it without telling a path. */
  claimStudy: {
    argument: z.strictObject({ name, sha256 }),
    answer: saveTargetSchema.nullable(),
    bytes: 0,
    from: 'page',
  },
  targetByDialog: {
    argument: z.strictObject({ suggestedName: name }),
    answer: saveTargetSchema.nullable(),
    bytes: 0,
    from: 'page',
  },
  targetByName: {
    argument: z.strictObject({ name: z.string().max(4096) }),
    answer: saveTargetSchema,
    bytes: 0,
    from: 'page',
  },
  saveStudy: {
    argument: z.strictObject({ targetId: idSchema, expected: fileStampSchema.nullable() }),
    answer: saveOutcomeSchema,
    bytes: LARGEST_STUDY_BYTES,
    from: 'page',
  },
  recentStudies: { argument: nothing, answer: z.array(recentStudySchema), bytes: 0, from: 'page' },
  openRecent: {
    argument: z.strictObject({ id: idSchema }),
    answer: openedFileSchema,
    bytes: 0,
    from: 'page',
  },
  forgetRecent: { argument: z.strictObject({ id: idSchema }), answer: nothing, bytes: 0, from: 'page' },
  keepUnsaved: {
    argument: z.strictObject({ workId: idSchema, title: z.string().max(1024) }),
    answer: nothing,
    bytes: LARGEST_STUDY_BYTES,
    from: 'page',
  },
  listUnsaved: { argument: nothing, answer: z.array(unsavedWorkSchema), bytes: 0, from: 'page' },
  /** Answers the work's bytes as well; whose it is stays. */
  lookAtUnsaved: { argument: z.strictObject({ workId: idSchema }), answer: nothing, bytes: 0, from: 'page' },
  /** Answers the work's bytes as well, and makes the asking window its owner. */
  takeUnsaved: { argument: z.strictObject({ workId: idSchema }), answer: nothing, bytes: 0, from: 'page' },
  dropUnsaved: { argument: z.strictObject({ workId: idSchema }), answer: nothing, bytes: 0, from: 'page' },
  /** Asks by dialog where an exported file goes; null when the user gives it up. */
  startExport: {
    argument: z.strictObject({ suggestedName: name, mimeType: z.string().max(200) }),
    answer: z.strictObject({ exportId: idSchema, name, folder: pathSchema }).nullable(),
    bytes: 0,
    from: 'page',
  },
  addToExport: {
    argument: z.strictObject({ exportId: idSchema }),
    answer: nothing,
    bytes: LARGEST_PIECE_BYTES,
    from: 'page',
  },
  finishExport: {
    argument: z.strictObject({ exportId: idSchema, keep: z.boolean() }),
    answer: nothing,
    bytes: 0,
    from: 'page',
  },
  setWindowState: { argument: windowStateSchema, answer: nothing, bytes: 0, from: 'page' },
  /** The window's answer to a close request. */
  answerClose: { argument: z.strictObject({ close: z.boolean() }), answer: nothing, bytes: 0, from: 'page' },
} as const satisfies Record<string, CallShape>;

interface CallShape {
  argument: z.ZodType;
  answer: z.ZodType;
  bytes: number;
  from: 'page' | 'preload';
}

export type CallName = keyof typeof CALLS;
export type Argument<N extends CallName> = z.infer<(typeof CALLS)[N]['argument']>;
export type Answer<N extends CallName> = z.infer<(typeof CALLS)[N]['answer']>;

/** What goes back over the wire: an answer and perhaps bytes, or the sentence of a refusal. */
export type Reply =
  | { answer: unknown; bytes: Uint8Array | null }
  | { refused: string; refusedKind: 'use' | 'input' };

const replyHeadSchema = z.union([
  z.strictObject({ answer: z.unknown() }),
  z.strictObject({ refused: z.string(), refusedKind: z.enum(['use', 'input']) }),
]);

export function isCallName(value: unknown): value is CallName {
  return typeof value === 'string' && Object.hasOwn(CALLS, value);
}

/** Checks what came with a call. Throws Refusal (use) that names the part that does not fit. */
export function checkArgument<N extends CallName>(
  call: N,
  argument: unknown,
  byteCount: number,
): Argument<N> {
  const most = CALLS[call].bytes;
  if (byteCount > most)
    throw new Refusal(`${call} came with ${byteCount} bytes, at most ${most} fit.`, 'use');
  return check(CALLS[call].argument, argument, `What came with ${call}`) as Argument<N>;
}

/** Checks what a host answered. Throws Refusal that names the part that does not fit. */
export function checkAnswer<N extends CallName>(call: N, answer: unknown): Answer<N> {
  return check(CALLS[call].answer, answer, `What ${call} answered`) as Answer<N>;
}

/** Reads a reply that came over a wire; `bytes` is what came beside it. Throws the Refusal that a host sent. */
export function checkReply<N extends CallName>(
  call: N,
  head: unknown,
  bytes: Uint8Array | null,
): { answer: Answer<N>; bytes: Uint8Array | null } {
  const reply = check(replyHeadSchema, head, `The reply to ${call}`);
  if ('refused' in reply) throw new Refusal(reply.refused, reply.refusedKind);
  return { answer: checkAnswer(call, reply.answer), bytes };
}

function check<S extends z.ZodType>(schema: S, value: unknown, what: string): z.infer<S> {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  const issue = result.error.issues[0];
  const where = issue?.path.length ? ` at ${issue.path.map(String).join('.')}` : '';
  throw new Refusal(
    `${what} does not fit${where} (${issue?.message ?? 'unknown'}): the window and its host do not belong together, start the program again.`,
    'use',
  );
}
