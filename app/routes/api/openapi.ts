import { env } from "~/env.server";
import { wrongMethod } from "./endpoint.server.ts";
import { openApiDocument } from "./openapi-document.ts";

/** What the API can be asked, for programs: the one endpoint that needs no token. */
export function loader({ request }: { request: Request }) {
  if (request.method !== "GET" && request.method !== "HEAD") return wrongMethod(request.method, "GET");
  return Response.json(openApiDocument(env.BASE_URL), {
    headers: { "Cache-Control": "public, max-age=300", "Access-Control-Allow-Origin": "*" },
  });
}

export const action = loader;
