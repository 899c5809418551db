import { route } from "@/lib/http/route";
import { type FileSize, fileResponse, readFile } from "@/lib/services/files/read";

/** A file of a case: `size` is thumb, display or original. */
export const GET = route<{ id: string }>(async ({ ctx, params, url }) => {
  const asked = url.searchParams.get("size");
  const size: FileSize = asked === "thumb" || asked === "original" ? asked : "display";
  return fileResponse(await readFile(ctx, params.id, size));
});
