import "server-only";
import type { Ctx } from "@/lib/auth/context";
import { requestFacts } from "@/lib/auth/session";
import { AppError } from "@/lib/errors";
import { openLink } from "@/lib/services/quotes/links";
import { limitRate } from "./rate-limit";
import { guarded } from "./route";

const LOOKUPS_PER_MINUTE = 600;

/** Opens a customer's link for a handler; what is expired, revoked or unknown answers alike: not found. */
export function linkRoute<P extends { secret: string }>(
  handler: (call: { request: Request; ctx: Ctx; params: P }) => Promise<Response>,
) {
  return async (request: Request, context: { params: Promise<P> }): Promise<Response> => {
    const facts = await requestFacts();
    return guarded(request, facts.requestId, async () => {
      limitRate(request, "link", { perMinute: LOOKUPS_PER_MINUTE });
      const params = await context.params;
      const opened = await openLink(params.secret, facts);
      if (opened?.state !== "open")
        throw new AppError("not_found", "This link does not work any more. Please call the shop.");
      return handler({ request, ctx: opened.ctx, params });
    });
  };
}
