import { linkRoute } from "@/lib/http/link-route";
import { toAppError } from "@/lib/http/problem";
import { askQuestion } from "@/lib/services/quotes/approve";
import { perform } from "@/lib/services/verb";
import { clearFaults, faultCookie, seeOther } from "../../../_views/faults";

/** Takes a question to the shop as a plain form. */
export const POST = linkRoute<{ secret: string }>(async ({ request, ctx, params }) => {
  const path = `/q/${params.secret}`;
  const text = String((await request.formData()).get("text") ?? "").trim();
  try {
    await perform(askQuestion, ctx, { text });
    return seeOther(path, clearFaults(path));
  } catch (error) {
    return seeOther(path, faultCookie(path, { errors: { question: toAppError(error).message }, question: text }));
  }
});
