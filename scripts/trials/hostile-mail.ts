import { createServer, type Socket } from "node:net";
import { LOOPBACK } from "../stack/ports.ts";

/** A mail server that goes wrong in a chosen way for its first connections, and then does its work. */

export type Fault =
  /** Says nothing at all until the other side gives up. */
  | "silent"
  /** Answers every line late, but rightly. */
  | "slow"
  | "greets with 421"
  | "greets with 554"
  | "450 to the recipient"
  | "550 to the recipient"
  | "451 to the message"
  | "552 to the message"
  | "drops after RCPT"
  | "drops in the message"
  /** Read the whole message, kept nothing. */
  | "drops before the reply, not kept"
  /** Read the whole message and kept it: nobody can know. */
  | "drops before the reply, kept";

export interface HostileServer {
  url: string;
  /** Message-IDs in the order in which mails were taken on. */
  taken: string[];
  connections: () => number;
  /** What the next connections meet; after them all is well. */
  plan: (faults: Fault[]) => void;
  close: () => Promise<void>;
}

export async function startHostileServer(port = 0): Promise<HostileServer> {
  const taken: string[] = [];
  const sockets = new Set<Socket>();
  let planned: Fault[] = [];
  let connections = 0;
  const server = createServer((socket) => {
    connections += 1;
    sockets.add(socket);
    socket.on("close", () => sockets.delete(socket));
    socket.on("error", () => undefined);
    converse(socket, planned.shift(), taken);
  });
  await new Promise<void>((resolve) => server.listen(port, LOOPBACK, resolve));
  const { port: bound } = server.address() as { port: number };
  return {
    url: `smtp://${LOOPBACK}:${bound}`,
    taken,
    connections: () => connections,
    plan: (faults) => {
      planned = [...faults];
    },
    close: () =>
      new Promise((resolve) => {
        for (const socket of sockets) socket.destroy();
        server.close(() => resolve());
      }),
  };
}

/** Speaks as much of RFC 5321 as one mail needs. */
function converse(socket: Socket, fault: Fault | undefined, taken: string[]): void {
  if (fault === "silent") return;
  const say = (line: string) => {
    setTimeout(() => socket.writable && socket.write(`${line}\r\n`), fault === "slow" ? SLOW_MS : 0);
  };
  let text = "";
  let inMessage = false;
  socket.setEncoding("utf8");
  socket.on("data", (chunk: string) => {
    text += chunk;
    if (inMessage) {
      if (fault === "drops in the message") {
        socket.destroy();
        return;
      }
      if (!text.endsWith("\r\n.\r\n")) return;
      inMessage = false;
      endOfMessage(text);
      text = "";
      return;
    }
    for (let at = text.indexOf("\r\n"); at >= 0 && !inMessage; at = text.indexOf("\r\n")) {
      const line = text.slice(0, at);
      text = text.slice(at + 2);
      answer(line.toUpperCase());
    }
  });
  say(
    fault === "greets with 421"
      ? "421 not now"
      : fault === "greets with 554"
        ? "554 no"
        : "220 invented.example",
  );

  function answer(line: string) {
    if (line.startsWith("RCPT")) {
      if (fault === "drops after RCPT") return socket.destroy();
      if (fault === "450 to the recipient") return say("450 mailbox busy");
      if (fault === "550 to the recipient") return say("550 no such mailbox");
    }
    if (line.startsWith("DATA")) {
      inMessage = true;
      return say("354 go on");
    }
    if (line.startsWith("QUIT")) return socket.end("221 bye\r\n");
    say(line.startsWith("EHLO") ? "250 invented.example" : "250 ok");
  }

  function endOfMessage(message: string) {
    if (fault === "451 to the message") return say("451 try again");
    if (fault === "552 to the message") return say("552 too much");
    if (fault === "drops before the reply, not kept") return socket.destroy();
    taken.push(/^message-id:\s*(\S+)/im.exec(message)?.[1] ?? "none");
    if (fault === "drops before the reply, kept") return socket.destroy();
    say("250 taken");
  }
}

const SLOW_MS = 150;
