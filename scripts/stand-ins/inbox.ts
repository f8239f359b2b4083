import { createServer, type ServerResponse } from "node:http";
import { LOOPBACK } from "../stack/ports.ts";
import type { Mail, Mailbox, MailSummary } from "./mailbox.ts";
import { escapeHtml, send, sendJson, sendPage } from "./page.ts";

/**
 * The inbox page, and the same as JSON: `GET /api/mails?to=`, `GET /api/mails/:id`, `DELETE /api/mails`.
 * Pages: `/`, `/mails/:id`, `/mails/:id/html`, `/mails/:id/raw`, `/mails/:id/attachments/:index`.
 */
export function startInbox(mailbox: Mailbox, port: number): Promise<() => Promise<void>> {
  const server = createServer(async (request, response) => {
    const url = new URL(request.url ?? "/", "http://inbox");
    const to = url.searchParams.get("to") ?? undefined;
    if (request.method === "DELETE" && url.pathname === "/api/mails") {
      mailbox.clear();
      sendJson(response, 200, []);
    } else if (request.method !== "GET") {
      sendJson(response, 405, { message: "Only GET here" });
    } else if (url.pathname === "/") {
      sendPage(response, 200, "Inbox", listOf(mailbox.list(to)));
    } else if (url.pathname === "/api/mails") {
      sendJson(response, 200, mailbox.list(to));
    } else {
      await sendPartOf(mailbox, url.pathname, response);
    }
  });
  return new Promise((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, LOOPBACK, () =>
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

const PART = /^\/(?<kind>api\/mails|mails)\/(?<id>\d{8})(?<rest>\/html|\/raw|\/attachments\/(?<index>\d+))?$/;

async function sendPartOf(mailbox: Mailbox, path: string, response: ServerResponse): Promise<void> {
  const { kind, id = "", rest, index } = PART.exec(path)?.groups ?? {};
  const mail = await mailbox.read(id);
  if (!mail) {
    sendPage(response, 404, "No such mail", '<p><a href="/">All mails</a></p>');
  } else if (kind === "api/mails") {
    sendJson(response, 200, mail);
  } else if (index !== undefined) {
    const found = await mailbox.attachment(id, Number(index));
    if (!found) return sendPage(response, 404, "No such attachment", "");
    const name = encodeURIComponent(found.name);
    response.setHeader("Content-Disposition", `attachment; filename*=UTF-8''${name}`);
    send(response, 200, "application/octet-stream", found.content);
  } else if (rest === "/raw") {
    send(response, 200, "text/plain; charset=utf-8", mailbox.raw(id) ?? "");
  } else if (rest === "/html") {
    // Somebody else's markup: no scripts, no origin, nothing fetched.
    response.setHeader(
      "Content-Security-Policy",
      "sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:",
    );
    send(response, 200, "text/html; charset=utf-8", mail.html ?? "");
  } else {
    sendPage(response, 200, mail.subject || "(no subject)", detailsOf(mail));
  }
}

function listOf(mails: MailSummary[]): string {
  if (mails.length === 0)
    return '<p class="note">No mail yet. Whatever Swale sends on this machine arrives here.</p>';
  const rows = mails.map(
    (mail) =>
      `<tr><td><a href="/mails/${mail.id}">${escapeHtml(mail.subject || "(no subject)")}</a></td><td>${escapeHtml(mail.to.join(", "))}</td><td>${escapeHtml(mail.at)}</td></tr>`,
  );
  return `<table><thead><tr><th>Subject</th><th>To</th><th>Arrived (UTC)</th></tr></thead><tbody>${rows.join("")}</tbody></table>`;
}

function detailsOf(mail: Mail): string {
  const attachments = mail.attachments.map(
    ({ name, type, bytes }, i) =>
      `<li><a href="/mails/${mail.id}/attachments/${i}">${escapeHtml(name)}</a> (${escapeHtml(type)}, ${bytes} bytes)</li>`,
  );
  return `<p><a href="/">All mails</a></p>
<p>From ${escapeHtml(mail.from)}<br>To ${escapeHtml(mail.to.join(", "))}<br>${escapeHtml(mail.at)}</p>
${mail.html ? `<h2>As sent</h2><iframe title="The mail as sent" sandbox src="/mails/${mail.id}/html"></iframe>` : ""}
<h2>Text</h2><pre>${escapeHtml(mail.text)}</pre>
${attachments.length > 0 ? `<h2>Attachments</h2><ul>${attachments.join("")}</ul>` : ""}
<p><a href="/mails/${mail.id}/raw">The message as it came</a></p>`;
}
