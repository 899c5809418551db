import { linkRoute } from "@/lib/http/link-route";
import { fileResponse, readCustomerPhoto } from "@/lib/services/files/read";

/** A photo that the sent quote shows. */
export const GET = linkRoute<{ secret: string; id: string }>(async ({ ctx, params }) =>
  fileResponse(await readCustomerPhoto(ctx, params.id, "display")),
);
