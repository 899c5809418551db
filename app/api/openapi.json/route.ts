import { env } from "@/lib/env";
import { openApiDocument } from "@/lib/http/openapi";

/** The API's description; it holds no data and is open. */
export function GET(): Response {
  return Response.json(openApiDocument(env().APP_URL));
}
