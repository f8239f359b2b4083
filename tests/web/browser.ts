/** A browser without scripts: keeps cookies, sends forms, follows nothing by itself. */

export const SERVER = process.env.SWALE_URL ?? "";

type Fields = Record<string, string | Blob>;

export class Browser {
  readonly #cookies = new Map<string, string>();

  constructor(cookie?: string) {
    if (cookie) this.#take([cookie]);
  }

  get(path: string, headers: Record<string, string> = {}): Promise<Response> {
    return this.#ask(path, { headers });
  }

  /** Sends a form as a page of this site does; another `Origin` may be given. */
  post(path: string, fields: Fields, headers: Record<string, string> = {}): Promise<Response> {
    return this.#ask(path, { method: "POST", body: formOf(fields), headers: { Origin: SERVER, ...headers } });
  }

  /** Sends bytes that call themselves a form. */
  postBody(path: string, body: string, type: string): Promise<Response> {
    return this.#ask(path, { method: "POST", body, headers: { Origin: SERVER, "Content-Type": type } });
  }

  /** The value of a cookie; undefined for none. */
  cookie(name: string): string | undefined {
    return this.#cookies.get(name);
  }

  setCookie(name: string, value: string): void {
    this.#cookies.set(name, value);
  }

  async #ask(path: string, init: RequestInit): Promise<Response> {
    const headers = new Headers(init.headers);
    const cookies = [...this.#cookies].map(([name, value]) => `${name}=${value}`).join("; ");
    if (cookies) headers.set("Cookie", cookies);
    const url = new URL(path, SERVER);
    const response = await fetch(url, { ...init, headers, redirect: "manual" });
    if (url.origin === new URL(SERVER).origin) this.#take(response.headers.getSetCookie());
    return response;
  }

  #take(lines: string[]): void {
    for (const line of lines) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      if (!name) continue;
      if (/;\s*max-age=0\b/i.test(line) || /;\s*expires=thu, 01 jan 1970/i.test(line)) {
        this.#cookies.delete(name);
      } else this.#cookies.set(name, value);
    }
  }
}

/** Plain fields go as a plain form, files as multipart. */
function formOf(fields: Fields): URLSearchParams | FormData {
  const entries = Object.entries(fields);
  if (entries.every(([, value]) => typeof value === "string")) {
    return new URLSearchParams(entries as [string, string][]);
  }
  const form = new FormData();
  for (const [name, value] of entries) form.set(name, value);
  return form;
}

/** Asks the API with a token. */
export function askApi(path: string, token: string | null, init: RequestInit = {}): Promise<Response> {
  const headers = new Headers(init.headers);
  if (token) headers.set("Authorization", `Bearer ${token}`);
  return fetch(new URL(`/api/v1${path}`, SERVER), { ...init, headers, redirect: "manual" });
}
