import { existsSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import path from "node:path";
import { ROOT } from "../install.mjs";

/** Somebody who can sign in through the stand-in. All of them are invented. */
export interface Person {
  id: number;
  login: string;
  name: string;
  email: string;
  /** False for a person whose e-mail address the provider has not checked. */
  verified?: boolean;
}

const FIRST_NEW_ID = 2001;
const LOGIN = /^[a-z\d](?:[a-z\d]|-(?=[a-z\d])){0,38}$/i;

/** The demo people and those added on the authorize page, who are kept in `folder`. */
export class People {
  readonly #file: string;
  readonly #added: Person[];
  readonly #demo: Person[];

  constructor(folder: string) {
    this.#file = path.join(folder, "people.json");
    this.#demo = JSON.parse(readFileSync(path.join(ROOT, "scripts", "demo-people.json"), "utf8"));
    this.#added = existsSync(this.#file) ? JSON.parse(readFileSync(this.#file, "utf8")) : [];
  }

  all(): Person[] {
    return [...this.#demo, ...this.#added];
  }

  find(login: string): Person | undefined {
    return this.all().find((person) => person.login.toLowerCase() === login.toLowerCase());
  }

  /** Adds somebody new, or says in words what is wrong with the form. */
  add(form: URLSearchParams): Person | string {
    const login = (form.get("new_login") ?? "").trim();
    const name = (form.get("name") ?? "").trim() || login;
    const email = (form.get("email") ?? "").trim();
    if (!LOGIN.test(login)) return "A user name has letters, digits and single hyphens, 39 at most.";
    if (this.find(login)) return "That user name is taken here; choose it from the list instead.";
    if (!/^[^\s@]+@[^\s@]+$/.test(email)) return "That is not an e-mail address.";
    const id = Math.max(FIRST_NEW_ID - 1, ...this.#added.map((person) => person.id)) + 1;
    const person = { id, login, name, email, verified: form.get("unverified") === null };
    this.#added.push(person);
    writeFileSync(`${this.#file}.new`, JSON.stringify(this.#added));
    renameSync(`${this.#file}.new`, this.#file);
    return person;
  }
}
