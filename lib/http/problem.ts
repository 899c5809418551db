import { ZodError } from "zod";
import "@/lib/fault-words";
import { AppError, type ErrorCode, type FieldError } from "@/lib/errors";

export const STATUS: Record<ErrorCode, number> = {
  invalid: 400,
  unauthenticated: 401,
  forbidden: 403,
  not_found: 404,
  conflict: 409,
  precondition: 422,
  too_many: 429,
  internal: 500,
};

const TITLE: Record<ErrorCode, string> = {
  invalid: "Something in it does not fit",
  unauthenticated: "Not signed in",
  forbidden: "Not allowed",
  not_found: "Not found",
  conflict: "Someone else changed it first",
  precondition: "Not yet possible",
  too_many: "Too many at once",
  internal: "A fault on our side",
};

/** RFC 9457 problem details with this API's extensions. */
export interface Problem {
  type: string;
  title: string;
  status: number;
  detail: string;
  instance: string;
  code: ErrorCode;
  requestId: string;
  errors: FieldError[];
  current?: unknown;
}

export function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((part) => `/${String(part).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("");
}

interface DatabaseError {
  code?: string;
  constraint?: string;
}

/** What the database refused, as a refusal of ours where that is what it is. */
function fromDatabase(error: unknown): AppError | null {
  const { code } = ((error as { cause?: unknown }).cause ?? error) as DatabaseError;
  if (code === "23505") return new AppError("conflict", "That already exists.", { cause: error });
  if (code === "23503")
    return new AppError("not_found", "What this refers to does not exist, or belongs to another shop.", {
      cause: error,
    });
  if (code === "23514") return new AppError("precondition", "The record does not allow this.", { cause: error });
  if (code === "22021" || code === "22P05")
    return new AppError("invalid", "The text holds a character that can't be kept (a NUL). Remove it and send again.", {
      cause: error,
    });
  if (code === "22003" || code === "22008")
    return new AppError("invalid", "A number or a date is too large to be kept.", { cause: error });
  if (code === "40001" || code === "40P01")
    return new AppError("conflict", "Two writes met. Try again.", { cause: error });
  return null;
}

export function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (error instanceof ZodError) {
    const fields = error.issues.map((issue) => ({ pointer: pointerOf(issue.path), detail: issue.message }));
    const first = fields[0];
    // the sentence is for people; programs find the place in `errors`
    return new AppError("invalid", first?.detail ?? "The request does not fit.", { fields, cause: error });
  }
  return (
    fromDatabase(error) ??
    new AppError(
      "internal",
      "This did not go through. Nothing was changed. Try again; if it stays, give us the request number.",
      { cause: error },
    )
  );
}

export function problemOf(error: unknown, instance: string, requestId: string): Problem {
  const known = toAppError(error);
  return {
    type: `urn:firedeck:problem:${known.code}`,
    title: TITLE[known.code],
    status: STATUS[known.code],
    detail: known.message,
    instance,
    code: known.code,
    requestId,
    errors: known.fields,
    ...(known.current === undefined ? {} : { current: known.current }),
  };
}
