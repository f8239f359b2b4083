import { escapeHtml } from "./page.ts";
import type { Person } from "./people.ts";

const PASSED_ON = ["client_id", "redirect_uri", "state", "scope"];

/** The choice of people, somebody new, and the way out. */
export function authorizePage(query: URLSearchParams, people: Person[], problem?: string): string {
  const hidden = PASSED_ON.filter((name) => query.has(name))
    .map((name) => `<input type="hidden" name="${name}" value="${escapeHtml(query.get(name) ?? "")}">`)
    .join("");
  const form = (inner: string) =>
    `<form method="post" action="/login/oauth/authorize">${hidden}${inner}</form>`;
  const choices = people.map(
    ({ login, name }) =>
      `<li>${form(`<input type="hidden" name="login" value="${escapeHtml(login)}"><button name="decision" value="allow">${escapeHtml(name)} (${escapeHtml(login)})</button>`)}</li>`,
  );
  return `<p class="note">This page stands in for GitHub on this machine. Everybody on it is invented, and no password is asked.</p>
${problem ? `<p role="alert"><strong>${escapeHtml(problem)}</strong></p>` : ""}
<ul class="people">${choices.join("")}</ul>
<h2>Someone new</h2>
${form(`<label>User name <input type="text" name="new_login" required maxlength="39" autocomplete="off"></label>
<label>Name <input type="text" name="name" maxlength="120" autocomplete="off"></label>
<label>E-mail <input type="email" name="email" required autocomplete="off"></label>
<label><input type="checkbox" name="unverified"> the address was not confirmed</label>
<button name="decision" value="new">Sign in as this person</button>`)}
<h2>Or not</h2>
${form('<button name="decision" value="deny">Do not sign in</button>')}`;
}
