/** Every refusal that the domain knows. Screens and handlers turn the code into words and a status once. */
export type AppErrorCode =
  | 'unauthenticated'
  | 'forbidden'
  | 'not_found'
  | 'invalid'
  | 'stale'
  | 'conflict'
  | 'wrong_state'
  | 'expired'
  | 'too_many'
  | 'too_large'
  | 'bad_origin'
  | 'unsupported_media'
  | 'busy';

const STATUS: Record<AppErrorCode, number> = {
  unauthenticated: 401,
  forbidden: 403,
  not_found: 404,
  invalid: 400,
  stale: 409,
  conflict: 409,
  wrong_state: 409,
  expired: 410,
  too_many: 429,
  too_large: 413,
  bad_origin: 403,
  unsupported_media: 415,
  busy: 503,
};

const DEFAULT_TEXT: Record<AppErrorCode, string> = {
  unauthenticated: 'Please sign in first.',
  forbidden: 'Your roles in this cellar do not allow that. An owner can change them.',
  not_found: 'There is nothing here, or it is not yours to see.',
  invalid: 'Something in the form is not right.',
  stale: 'Somebody changed this while you had it open. Nothing was saved: reload to see the newer version.',
  conflict: 'That does not fit with what is already there. Nothing was saved.',
  wrong_state: 'The session is past that point.',
  expired: 'This link has run out or was used before. Ask for a new one.',
  too_many: 'Too many tries. Wait a few minutes and try again.',
  too_large: 'That is more than this form can take.',
  bad_origin: 'The request did not come from this site, so nothing was done.',
  unsupported_media: 'This address takes JSON only.',
  busy: 'The database is busy for a moment. Nothing was lost: try again.',
};

/**
 * A refusal with a reason that may be shown. The message never carries data of other people, of
 * barrels or of the key.
 */
export class AppError extends Error {
  readonly code: AppErrorCode;
  /** Messages by field name, for forms. */
  readonly fieldErrors: Readonly<Record<string, string>>;

  constructor(code: AppErrorCode, message: string = DEFAULT_TEXT[code], fieldErrors: Record<string, string> = {}) {
    super(message);
    this.name = 'AppError';
    this.code = code;
    this.fieldErrors = fieldErrors;
  }

  get status(): number {
    return STATUS[this.code];
  }
}

/**
 * The refusal behind an error, or null when it is a fault of ours.
 * A lock held by another process counts as `busy`: the caller may simply try again.
 */
export function asAppError(error: unknown): AppError | null {
  if (error instanceof AppError) return error;
  const code = (error as { code?: unknown } | null)?.code;
  if (code === 'SQLITE_BUSY' || code === 'SQLITE_BUSY_SNAPSHOT') return new AppError('busy');
  if (code === 'SQLITE_FULL') return new AppError('busy', 'The disk of the server is full. Nothing was lost: make room, then send again.');
  return null;
}
