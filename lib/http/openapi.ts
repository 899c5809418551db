import "server-only";
import { z } from "zod";
import { PERMISSIONS } from "@/lib/auth/permissions";
import { VERBS } from "@/lib/services/registry";
import { STATUS } from "./problem";

const problem = {
  type: "object",
  required: ["type", "title", "status", "detail", "code", "requestId", "errors"],
  properties: {
    type: { type: "string" },
    title: { type: "string" },
    status: { type: "integer" },
    detail: { type: "string" },
    instance: { type: "string" },
    code: { enum: Object.keys(STATUS) },
    requestId: { type: "string" },
    errors: {
      type: "array",
      items: {
        type: "object",
        required: ["pointer", "detail"],
        properties: { pointer: { type: "string" }, detail: { type: "string" } },
      },
    },
    current: {},
  },
};

/** The OpenAPI 3.1 document of the API, made from the same schemas that check its input. */
export function openApiDocument(server: string) {
  const paths: Record<string, unknown> = {};
  for (const verb of VERBS.values()) {
    const roles = PERMISSIONS[verb.action] as readonly string[];
    if (!roles.some((role) => role === "owner" || role === "writer" || role === "technician")) continue;
    paths[`/api/do/${verb.name}`] = {
      post: {
        operationId: verb.name,
        summary: verb.summary,
        "x-action": verb.action,
        description: `Allowed to: ${roles.join(", ")}.`,
        parameters: [
          {
            name: "Idempotency-Key",
            in: "header",
            schema: { type: "string", maxLength: 100 },
            description: "A repeat with the same key answers what the first one answered.",
          },
          {
            name: "If-Match",
            in: "header",
            schema: { type: "string" },
            description: "The version seen, instead of `version` in the body.",
          },
        ],
        requestBody: {
          required: true,
          content: {
            "application/json": { schema: z.toJSONSchema(verb.input, { io: "input", unrepresentable: "any" }) },
          },
        },
        responses: {
          "200": { description: "Done", content: { "application/json": { schema: {} } } },
          default: {
            description: "Refused or failed",
            content: { "application/problem+json": { schema: { $ref: "#/components/schemas/Problem" } } },
          },
        },
      },
    };
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Firedeck",
      version: "1",
      description: "Cases, readings, assessments, quotes and papers of one shop: the one you are signed in to.",
    },
    servers: [{ url: server }],
    paths,
    components: {
      schemas: { Problem: problem },
      securitySchemes: { session: { type: "apiKey", in: "cookie", name: "better-auth.session_token" } },
    },
    security: [{ session: [] }],
  };
}
