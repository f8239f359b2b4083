import { writeFileSync } from "node:fs";
import path from "node:path";
import { DATABASE_NAME, databaseUrl } from "./database.ts";
import { choosePorts, LOOPBACK } from "./ports.ts";
import { readOrMakeSecrets, type Secrets } from "./secrets.ts";

export type Environment = Record<string, string | undefined>;

/** Which parts run here; each is left out where the environment names a real one. */
export interface LocalParts {
  database: boolean;
  storage: boolean;
  mail: boolean;
  github: boolean;
}

export interface Settings {
  local: LocalParts;
  ports: Record<PortName, number>;
  secrets: Secrets;
  /** All that the server needs, checked by app/env.server.ts when it starts. */
  environment: Environment;
}

const PORT_NAMES = ["database", "storage", "mail", "inbox", "github"] as const;
type PortName = (typeof PORT_NAMES)[number];

/** The key pair that s3rver knows. */
const STORAGE_KEY = "S3RVER";
export const GITHUB_CLIENT_ID = "swale-local";
/** Where `npm run admin` finds the local parts. */
export const ENVIRONMENT_FILE = "environment.json";
const SETTING =
  /^(NODE_ENV|HOST|PORT|BASE_URL|DATABASE_URL|S3_.*|SMTP_URL|MAIL_FROM|GITHUB_.*|SESSION_SECRET|LOCAL_.*)$/;
export const CALLBACK_PATH = "/auth/github/callback";

export function localPartsOf(given: Environment): LocalParts {
  return {
    database: !given.DATABASE_URL,
    storage: !given.S3_ENDPOINT && !given.S3_BUCKET,
    mail: !given.SMTP_URL,
    github: !given.GITHUB_CLIENT_ID,
  };
}

/** What is given by environment stays; the rest points at the local parts. */
export async function settingsFor(folder: string, given: Environment, port: number): Promise<Settings> {
  const local = localPartsOf(given);
  const secrets = readOrMakeSecrets(folder);
  const ports = await choosePorts(folder, PORT_NAMES);
  const at = (name: PortName) => `http://${LOOPBACK}:${ports[name]}`;
  const environment: Environment = {
    ...given,
    NODE_ENV: "production",
    HOST: given.HOST || LOOPBACK,
    PORT: String(port),
    BASE_URL: given.BASE_URL || `http://localhost:${port}`,
    SESSION_SECRET: given.SESSION_SECRET || secrets.session,
  };
  if (local.database) environment.DATABASE_URL = databaseUrl(ports.database, secrets, DATABASE_NAME);
  if (local.storage) {
    environment.S3_ENDPOINT = at("storage");
    environment.S3_BUCKET = "swale";
    environment.S3_ACCESS_KEY_ID = STORAGE_KEY;
    environment.S3_SECRET_ACCESS_KEY = STORAGE_KEY;
    environment.S3_FORCE_PATH_STYLE = "1";
  }
  if (local.mail) {
    environment.SMTP_URL = `smtp://${LOOPBACK}:${ports.mail}`;
    environment.LOCAL_INBOX_URL = at("inbox");
  }
  if (local.github) {
    environment.GITHUB_CLIENT_ID = GITHUB_CLIENT_ID;
    environment.GITHUB_CLIENT_SECRET = secrets.githubClientSecret;
    environment.GITHUB_BASE_URL = at("github");
    environment.GITHUB_API_URL = at("github");
    environment.LOCAL_GITHUB = "1";
  }
  writeFileSync(path.join(folder, ENVIRONMENT_FILE), JSON.stringify(onlySettings(environment)), {
    mode: 0o600,
  });
  return { local, ports, secrets, environment };
}

function onlySettings(environment: Environment): Environment {
  return Object.fromEntries(Object.entries(environment).filter(([name]) => SETTING.test(name)));
}
