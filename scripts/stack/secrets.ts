import { randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import path from "node:path";

/** Made once a folder and kept in it, readable by its owner only. */
export interface Secrets {
  session: string;
  databasePassword: string;
  databaseRootPassword: string;
  githubClientSecret: string;
}

export function readOrMakeSecrets(folder: string): Secrets {
  const file = path.join(folder, "secrets.json");
  if (existsSync(file)) return JSON.parse(readFileSync(file, "utf8"));
  const secret = () => randomBytes(32).toString("hex");
  const secrets = {
    session: secret(),
    databasePassword: secret(),
    databaseRootPassword: secret(),
    githubClientSecret: secret(),
  };
  mkdirSync(folder, { recursive: true });
  writeFileSync(`${file}.new`, JSON.stringify(secrets), { mode: 0o600 });
  renameSync(`${file}.new`, file);
  return secrets;
}
