import { route } from "@/lib/http/route";
import { exportAudit } from "@/lib/services/audit/read";

/** The whole audit of the shop as JSON lines. */
export const GET = route(async ({ ctx }) => {
  const text = await exportAudit(ctx);
  return new Response(text, {
    headers: {
      "content-type": "application/x-ndjson",
      "content-disposition": 'attachment; filename="audit.ndjson"',
      "cache-control": "no-store",
    },
  });
});
