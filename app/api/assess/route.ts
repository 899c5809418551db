import { authorize } from "@/lib/auth/context";
import { assess } from "@/lib/diagnosis/assess";
import { parseCaseFile } from "@/lib/diagnosis/case-file";
import { AppError } from "@/lib/errors";
import { ok, route } from "@/lib/http/route";

/** Assesses a case file (version 1) without keeping it. */
export const POST = route(async ({ ctx, json }) => {
  authorize(ctx, "case.read");
  const parsed = parseCaseFile(await json());
  if (parsed.ok) return ok(assess(parsed.caseFile));
  const fields = parsed.errors.map((error) => ({
    pointer: `/${error.path.replaceAll(/[.[]/g, "/").replaceAll("]", "")}`,
    detail: error.reason,
  }));
  throw new AppError("invalid", `The case file does not fit: ${parsed.errors[0]?.path}: ${parsed.errors[0]?.reason}`, {
    fields,
  });
});
