import { createServer, type IncomingMessage, type ServerResponse } from "node:http";
import { LOOPBACK } from "../stack/ports.ts";
import { authorizePage } from "./github-page.ts";
import { type Client, Grants, mayReturnTo, sameSecret } from "./grants.ts";
import { sendJson, sendPage } from "./page.ts";
import { People, type Person } from "./people.ts";

export interface GithubOptions {
  folder: string;
  port: number;
  clients: Client[];
  /** The clock, in milliseconds. */
  now?: () => number;
}

const FORM_BYTES = 20_000;

/** Speaks the part of GitHub's OAuth and REST interface that signing in uses, for invented people. */
export function startGithub(options: GithubOptions): Promise<() => Promise<void>> {
  const people = new People(options.folder);
  const grants = new Grants(options.now);
  const clientOf = (id: string | null) => options.clients.find((client) => client.id === id);

  const server = createServer(async (request, response) => {
    const url = new URL(request.url ?? "/", "http://stand-in");
    switch (`${request.method} ${url.pathname}`) {
      case "GET /":
        sendPage(
          response,
          200,
          "A stand-in for GitHub",
          "<p>Swale sends people here to sign in. All of them are invented.</p>",
        );
        return;
      case "GET /login/oauth/authorize":
        authorize(url.searchParams, response);
        return;
      case "POST /login/oauth/authorize":
        decide(await readForm(request), response);
        return;
      case "POST /login/oauth/access_token":
        exchange(request, await readForm(request), response);
        return;
      case "GET /user":
        withPerson(request, response, (person) => profileOf(person));
        return;
      case "GET /user/emails":
        withPerson(request, response, (person, scopes) =>
          scopes.includes("user:email") || scopes.includes("user")
            ? [
                {
                  email: person.email,
                  primary: true,
                  verified: person.verified !== false,
                  visibility: "private",
                },
              ]
            : undefined,
        );
        return;
      default:
        sendJson(response, 404, { message: "Not Found" });
    }
  });

  function authorize(query: URLSearchParams, response: ServerResponse, problem?: string): void {
    const request = checked(query, response);
    if (request)
      sendPage(
        response,
        problem ? 422 : 200,
        "Who are you today?",
        authorizePage(query, people.all(), problem),
      );
  }

  /** The client and the address to go back to, or a refusal that goes back to nobody. */
  function checked(
    query: URLSearchParams,
    response: ServerResponse,
  ): { client: Client; back: URL } | undefined {
    const client = clientOf(query.get("client_id"));
    const redirectUri = query.get("redirect_uri") ?? client?.callback ?? "";
    if (client && mayReturnTo(client, redirectUri)) return { client, back: new URL(redirectUri) };
    const what = client
      ? "The redirect_uri is not the one registered for this application."
      : "No such client_id.";
    sendPage(response, client ? 400 : 404, "Not authorized", `<p>${what}</p>`);
    return undefined;
  }

  function decide(form: URLSearchParams, response: ServerResponse): void {
    const request = checked(form, response);
    if (!request) return;
    const { client, back } = request;
    const state = form.get("state");
    if (form.get("decision") === "deny") {
      back.searchParams.set("error", "access_denied");
      back.searchParams.set("error_description", "The user has denied your application access.");
    } else {
      const person = form.get("decision") === "new" ? people.add(form) : people.find(form.get("login") ?? "");
      if (person === undefined || typeof person === "string") {
        authorize(form, response, person ?? "Nobody here has that user name.");
        return;
      }
      const scopes = (form.get("scope") ?? "").split(/[\s,]+/).filter(Boolean);
      back.searchParams.set(
        "code",
        grants.issueCode(client, form.get("redirect_uri") ?? client.callback, scopes, person),
      );
    }
    if (state !== null) back.searchParams.set("state", state);
    response.writeHead(303, { Location: back.href, "Cache-Control": "no-store" }).end();
  }

  function exchange(request: IncomingMessage, form: URLSearchParams, response: ServerResponse): void {
    const [id, secret] = credentialsOf(request, form);
    const client = clientOf(id);
    const answer = (value: Record<string, string>) => sendTokenAnswer(request, response, value);
    if (!client || !sameSecret(secret, client.secret)) {
      answer(
        failure("incorrect_client_credentials", "The client_id and/or client_secret passed are incorrect."),
      );
      return;
    }
    const grantType = form.get("grant_type");
    if (grantType !== null && grantType !== "authorization_code") {
      answer(failure("unsupported_grant_type", "Only authorization_code is known here."));
      return;
    }
    const granted = grants.exchange(client, form.get("code") ?? "", form.get("redirect_uri"));
    if (!granted) answer(failure("bad_verification_code", "The code passed is incorrect or expired."));
    else answer({ access_token: granted.token, token_type: "bearer", scope: granted.scopes.join(",") });
  }

  function withPerson(
    request: IncomingMessage,
    response: ServerResponse,
    shape: (person: Person, scopes: string[]) => unknown,
  ): void {
    const holder = grants.holderOf(request.headers.authorization);
    const body = holder && shape(holder.person, holder.scopes);
    if (!holder) sendJson(response, 401, { message: "Bad credentials" });
    else if (body === undefined) sendJson(response, 404, { message: "Not Found" });
    else sendJson(response, 200, body);
  }

  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(options.port, LOOPBACK, () =>
      resolve(
        () =>
          new Promise((done) => {
            server.close(() => done());
            server.closeAllConnections();
          }),
      ),
    );
  });
}

function profileOf({ id, login, name }: Person) {
  // The address is asked for separately: most people keep it out of their public profile.
  return { id, login, name, email: null, type: "User", avatar_url: null, html_url: null };
}

function failure(error: string, description: string): Record<string, string> {
  return { error, error_description: description };
}

/** Failures come with status 200 too, as GitHub does it; form-encoded unless JSON was asked for. */
function sendTokenAnswer(
  request: IncomingMessage,
  response: ServerResponse,
  value: Record<string, string>,
): void {
  if (request.headers.accept?.includes("json")) sendJson(response, 200, value);
  else {
    response.writeHead(200, { "Content-Type": "application/x-www-form-urlencoded; charset=utf-8" });
    response.end(new URLSearchParams(value).toString());
  }
}

/** Client authentication in the header or in the form. */
function credentialsOf(request: IncomingMessage, form: URLSearchParams): [string, string] {
  const basic = /^basic (\S+)$/i.exec(request.headers.authorization ?? "")?.[1];
  if (!basic) return [form.get("client_id") ?? "", form.get("client_secret") ?? ""];
  const text = Buffer.from(basic, "base64").toString();
  const colon = text.indexOf(":");
  return [text.slice(0, colon), text.slice(colon + 1)];
}

async function readForm(request: IncomingMessage): Promise<URLSearchParams> {
  let text = "";
  for await (const chunk of request) {
    text += chunk;
    if (text.length > FORM_BYTES) break;
  }
  return new URLSearchParams(text);
}
