import { limitRate } from "@/lib/http/rate-limit";
import { assertOrigin, guarded, ok, readJson } from "@/lib/http/route";
import { openShop } from "@/lib/services/shops/open-shop";

/** Open to visitors: makes an account and its shop. */
export async function POST(request: Request): Promise<Response> {
  const requestId = request.headers.get("x-request-id") ?? crypto.randomUUID();
  return guarded(request, requestId, async () => {
    assertOrigin(request);
    limitRate(request, "sign-up", { perMinute: 20 });
    await openShop((await readJson(request)) as never, { requestId });
    return ok({ opened: true }, { status: 201 });
  });
}
