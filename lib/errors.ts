export const ERROR_CODES = [
  "invalid",
  "unauthenticated",
  "forbidden",
  "not_found",
  "conflict",
  "precondition",
  "too_many",
  "internal",
] as const;
export type ErrorCode = (typeof ERROR_CODES)[number];

export interface FieldError {
  /** JSON pointer into the input, as `/lines/0/quantityMilli`. */
  pointer: string;
  detail: string;
}

/** A refusal with a message fit for a user. Anything else that is thrown is a fault of ours and shows as `internal`. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly fields: FieldError[];
  /** For a conflict: what stands now, so that the screen can show both versions. */
  readonly current: unknown;

  constructor(
    code: ErrorCode,
    message: string,
    options: { fields?: FieldError[]; current?: unknown; cause?: unknown } = {},
  ) {
    super(message, { cause: options.cause });
    this.name = "AppError";
    this.code = code;
    this.fields = options.fields ?? [];
    this.current = options.current;
  }
}

export const notFound = (what = "This") =>
  new AppError("not_found", `${what} does not exist, or belongs to another shop.`);

export const invalidField = (pointer: string, detail: string) =>
  new AppError("invalid", detail, { fields: [{ pointer, detail }] });
