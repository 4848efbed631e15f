import type { Answer, Argument, CallName } from '../../shared-core/bridge/calls.ts';
import type { FileStamp, HostEvent, OpenedFile } from '../../shared-core/bridge/messages.ts';

/** How a page reaches its host: messages between processes, or HTTP on the loopback address. */
export interface Wire {
  readonly windowId: string;
  /** Rejects with the Refusal that the host sent, or one that says that the host does not answer. */
  call<N extends CallName>(
    call: N,
    argument: Argument<N>,
    bytes?: Uint8Array | null,
  ): Promise<{ answer: Answer<N>; bytes: Uint8Array | null }>;
  onEvent(handler: (event: HostEvent) => void): void;
  onLost(handler: () => void): void;
}

/** A file in the page's hands whose path the host learns, or does not. */
export interface PageFiles {
  /** Opens files that the user dropped or picked. */
  adopt(files: readonly File[]): Promise<OpenedFile[]>;
  /** Size, time and SHA-256 of a file that only the page holds; null when the host holds it. */
  fingerprint(file: OpenedFile): Promise<FileStamp | null>;
  /** The contents of a file that only the page holds; null when the host holds it. */
  read(file: OpenedFile): Promise<Uint8Array | null>;
  release(file: OpenedFile): void;
}
