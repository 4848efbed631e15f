import { basename, dirname } from 'node:path';
import { Refusal } from '../../shared-core/base/refusal.ts';

/** The system's code of a failed file call, such as ENOSPC; null when `error` is none. */
export function errorCode(error: unknown): string | null {
  if (!(error instanceof Error) || !('code' in error)) return null;
  return typeof error.code === 'string' ? error.code : null;
}

/**
 * One sentence for a person from a failed file call: what could not be done, why, and what to do.
 * `deed` completes "could not ..." (such as "be saved"); `path` is the file the user knows.
 */
export function fileTrouble(error: unknown, path: string, deed: string): string {
  if (error instanceof Refusal) return error.message;
  const name = basename(path);
  const folder = dirname(path);
  const subject = `${name} could not ${deed}: `;
  switch (errorCode(error)) {
    case 'ENOSPC':
      return `${subject}the disk that holds ${folder} is full; free some space there or choose another folder.`;
    case 'EDQUOT':
      return `${subject}your quota on the disk that holds ${folder} is used up; free some space or choose another folder.`;
    case 'EROFS':
      return `${subject}the disk that holds ${folder} can only be read; choose another folder.`;
    case 'EACCES':
    case 'EPERM':
      return `${subject}you have no permission for it in ${folder}; choose another file or change the permission.`;
    case 'ENOENT':
      return `${subject}it or the folder ${folder} is not there; check the name, or choose another place.`;
    case 'ENOTDIR':
      return `${subject}${folder} is not a folder; choose another place.`;
    case 'EISDIR':
      return `${subject}it is a folder; choose a file.`;
    case 'ENAMETOOLONG':
      return `${subject}its name is longer than that disk allows; choose a shorter one.`;
    case 'EFBIG':
      return `${subject}it is larger than that disk allows; choose another folder.`;
    case 'EBUSY':
    case 'ETXTBSY':
      return `${subject}another program holds it; close it there and try again.`;
    case 'EMFILE':
    case 'ENFILE':
      return `${subject}too many files are open on this machine; close some programs and try again.`;
    case 'ELOOP':
      return `${subject}its links lead in a circle; choose the file itself.`;
    case 'EIO':
      return `${subject}the disk reports a fault; choose another disk and check this one.`;
    default:
      return `${subject}the system says "${plainReason(error)}"; try again or choose another place.`;
  }
}

/** The same as a Refusal. */
export function fileRefusal(error: unknown, path: string, deed: string): Refusal {
  return error instanceof Refusal ? error : new Refusal(fileTrouble(error, path, deed));
}

function plainReason(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).split('\n')[0]!.slice(0, 200);
}
