import { notFound } from "@/lib/errors";
import { ok, route } from "@/lib/http/route";
import { VERBS } from "@/lib/services/registry";
import { perform } from "@/lib/services/verb";

/** Every write of staff: `POST /api/do/{verb}` with the verb's input as JSON and, from our own pages, an Idempotency-Key. */
export const POST = route<{ verb: string }>(async ({ request, ctx, params, json }) => {
  const verb = VERBS.get(params.verb);
  if (!verb) throw notFound("This act");
  const key = request.headers.get("idempotency-key")?.slice(0, 100) || undefined;
  const ifMatch = request.headers.get("if-match")?.replaceAll('"', "");
  const body = (await json()) as Record<string, unknown>;
  const input =
    ifMatch && /^\d+$/.test(ifMatch) && body.version === undefined ? { ...body, version: Number(ifMatch) } : body;
  const value = await perform(verb, ctx, input, { idempotencyKey: key });
  const version = (value as { version?: number } | null)?.version;
  return ok(value, version === undefined ? {} : { headers: { etag: `"${version}"` } });
});
