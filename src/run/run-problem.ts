/** Why a run cannot go on, told to a person: what happened and what to do. */
export class RunProblem extends Error {
  readonly hint: string;

  constructor(message: string, hint: string, options?: ErrorOptions) {
    super(message, options);
    this.name = 'RunProblem';
    this.hint = hint;
  }
}

/** A file-system error in plain words: `no space left on the disk`, else the system's own code. */
export function systemReason(error: unknown): string {
  const code = (error as NodeJS.ErrnoException)?.code ?? '';
  return reasons[code] ?? (error instanceof Error ? error.message : String(error));
}

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file or folder',
  ENAMETOOLONG: 'the name is too long',
  ELOOP: 'its links lead in a circle',
  EACCES: 'access is not allowed',
  EPERM: 'access is not allowed',
  EROFS: 'the file system is read-only',
  ENOSPC: 'no space is left on the disk',
  EDQUOT: 'the disk quota is used up',
  EFBIG: 'the file is larger than the system allows',
  EISDIR: 'it is a folder',
  ENOTDIR: 'part of the path is not a folder',
  EMFILE: 'too many files are open',
};
