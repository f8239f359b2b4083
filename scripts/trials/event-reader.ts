import http from "node:http";

/** A browser's `EventSource` as the standard has it, for trials: reads a stream, and comes again with the last id. */

interface ReaderOptions {
  /** Tried in turn: after a loss the next one. */
  servers: readonly string[];
  /** Path with the query of the first connection. */
  path: string;
  cookie: string;
  onEvent: (event: { name: string; data: string; id: string }, receivedMs: number) => void;
}

export class EventReader {
  connections = 0;
  /** Statuses other than 200, which end it. */
  refused: number | null = null;
  #lastId = "";
  #retryMs = 1000;
  #request: http.ClientRequest | undefined;
  #timer: NodeJS.Timeout | undefined;
  #closed = false;
  readonly #options: ReaderOptions;

  constructor(options: ReaderOptions) {
    this.#options = options;
    this.#connect();
  }

  close(): void {
    this.#closed = true;
    clearTimeout(this.#timer);
    this.#request?.destroy();
  }

  #connect(): void {
    const { servers, path, cookie } = this.#options;
    const url = new URL(path, servers[this.connections % servers.length]);
    this.connections += 1;
    const headers: Record<string, string> = { Accept: "text/event-stream", Cookie: cookie };
    if (this.#lastId) headers["Last-Event-ID"] = this.#lastId;
    const request = http.get(url, { headers, agent: false }, (response) => this.#read(response));
    this.#request = request;
    let lost = false;
    const lose = () => {
      if (lost || this.#closed || this.refused !== null) return;
      lost = true;
      this.#timer = setTimeout(() => this.#connect(), this.#retryMs);
    };
    request.once("error", lose);
    request.once("close", lose);
  }

  #read(response: http.IncomingMessage): void {
    if (response.statusCode !== 200) {
      this.refused = response.statusCode ?? 0;
      response.resume();
      return;
    }
    let text = "";
    response.setEncoding("utf8");
    response.on("error", () => undefined);
    response.on("data", (chunk: string) => {
      const receivedMs = performance.timeOrigin + performance.now();
      text += chunk;
      const blocks = text.split("\n\n");
      text = blocks.pop() ?? "";
      for (const block of blocks) this.#take(block, receivedMs);
    });
  }

  #take(block: string, receivedMs: number): void {
    const event = { name: "message", data: "", id: this.#lastId };
    for (const line of block.split("\n")) {
      const [, field, value] = /^([^:]*):? ?(.*)$/.exec(line) ?? [];
      if (field === "event") event.name = value;
      else if (field === "data") event.data += value;
      else if (field === "id") event.id = value;
      else if (field === "retry") this.#retryMs = Number(value);
    }
    this.#lastId = event.id;
    this.#options.onEvent(event, receivedMs);
  }
}
