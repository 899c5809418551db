import { authorize } from "@/lib/auth/context";
import { route } from "@/lib/http/route";
import { onChange } from "@/lib/realtime/changes";

const BEAT_MS = 25_000;

/** Server-sent events: the kinds of rows that changed in this shop, or in one case of it. */
export const GET = route(async ({ ctx, request, url }) => {
  authorize(ctx, "case.read");
  const caseId = url.searchParams.get("case");
  const encoder = new TextEncoder();
  const body = new ReadableStream<Uint8Array>({
    async start(controller) {
      const send = (text: string) => {
        try {
          controller.enqueue(encoder.encode(text));
        } catch {
          // the reader has gone; the abort below cleans up
        }
      };
      send(": open\n\n");
      const stop = await onChange((change) => {
        if (change.shop !== ctx.shopId || (caseId && change.case !== caseId)) return;
        send(`data: ${JSON.stringify({ case: change.case, entity: change.entity })}\n\n`);
      });
      const beat = setInterval(() => send(": beat\n\n"), BEAT_MS);
      request.signal.addEventListener("abort", () => {
        clearInterval(beat);
        stop();
        try {
          controller.close();
        } catch {
          // closed already
        }
      });
    },
  });
  return new Response(body, {
    headers: {
      "content-type": "text/event-stream",
      "cache-control": "no-cache, no-transform",
      "x-accel-buffering": "no",
    },
  });
});
