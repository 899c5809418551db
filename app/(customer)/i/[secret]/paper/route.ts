import { linkRoute } from "@/lib/http/link-route";
import { readLinkPaper } from "@/lib/services/quotes/customer-read";
import { pdfResponse } from "../../../_views/pdf";

/** The paper this link opens, byte for byte as issued. */
export const GET = linkRoute<{ secret: string }>(async ({ ctx }) => pdfResponse(await readLinkPaper(ctx)));
