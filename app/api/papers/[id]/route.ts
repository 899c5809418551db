import { route } from "@/lib/http/route";
import { readPaper } from "@/lib/services/cases/read";

/** An issued paper, byte for byte. */
export const GET = route<{ id: string }>(async ({ ctx, params, url }) => {
  const paper = await readPaper(ctx, params.id);
  const name = `${paper.kind}-${paper.number}.pdf`.replaceAll(/[^\w.-]/g, "-");
  const how = url.searchParams.has("download") ? "attachment" : "inline";
  return new Response(new Uint8Array(paper.bytes), {
    headers: {
      "content-type": "application/pdf",
      "content-disposition": `${how}; filename="${name}"`,
      "cache-control": "private, max-age=3600",
      etag: `"${paper.sha256}"`,
    },
  });
});
