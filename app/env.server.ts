import { z } from "zod";

export type Env = z.infer<typeof shape>;

const flag = z
  .enum(["", "0", "1", "false", "true"])
  .default("")
  .transform((value) => value === "1" || value === "true");

const address = z.url("must be an address such as http://localhost:3000");

const shape = z.object({
  NODE_ENV: z.enum(["development", "test", "production"]).default("development"),
  HOST: z.string().min(1).default("127.0.0.1"),
  PORT: z.coerce.number().int().min(1).max(65_535).default(3000),
  /** The public origin, without a slash at the end; links in mails and the callback of sign-in use it. */
  BASE_URL: address.transform((value) => new URL(value).origin),
  DATABASE_URL: z.string().regex(/^(mysql|mariadb):\/\//, "must start with mysql://"),
  /** Empty for the provider's own address of the region. */
  S3_ENDPOINT: address.optional(),
  S3_REGION: z.string().min(1).default("us-east-1"),
  S3_BUCKET: z.string().min(3),
  S3_ACCESS_KEY_ID: z.string().min(1),
  S3_SECRET_ACCESS_KEY: z.string().min(1),
  /** Set for stores that name the bucket in the path rather than in the host name. */
  S3_FORCE_PATH_STYLE: flag,
  SMTP_URL: z.string().regex(/^smtps?:\/\//, "must start with smtp:// or smtps://"),
  MAIL_FROM: z.string().min(3).default("Swale <swale@localhost>"),
  GITHUB_CLIENT_ID: z.string().min(1),
  GITHUB_CLIENT_SECRET: z.string().min(1),
  GITHUB_BASE_URL: address.default("https://github.com"),
  GITHUB_API_URL: address.default("https://api.github.com"),
  SESSION_SECRET: z.string().min(32, "must be at least 32 characters, and secret"),
  /** Where mails can be read when they are kept on this machine. */
  LOCAL_INBOX_URL: address.optional(),
  /** Set when sign-in is answered by the stand-in on this machine: pages then say so. */
  LOCAL_GITHUB: flag,
  LOG_LEVEL: z.enum(["silent", "fatal", "error", "warn", "info", "debug"]).default("info"),
  /** How many proxies in front of the server may be believed about the visitor's address; 0 for none. */
  TRUST_PROXY: z.coerce.number().int().min(0).max(10).default(0),
  /**
   * For tests alone: one origin on this machine that may be asked although it is not public (see services/safe-fetch).
   * Refused wherever BASE_URL is not of this machine itself.
   */
  WEBMENTION_TEST_ORIGIN: address.transform((value) => new URL(value).origin).optional(),
});

/** What opens a door for tests opens none of a server that others reach. */
function testsStayHere({ BASE_URL, WEBMENTION_TEST_ORIGIN }: Env, context: z.RefinementCtx) {
  if (WEBMENTION_TEST_ORIGIN === undefined || HERE.has(new URL(BASE_URL).hostname)) return;
  const message = "is for tests, and only where BASE_URL is http://localhost or http://127.0.0.1";
  context.addIssue({ code: "custom", path: ["WEBMENTION_TEST_ORIGIN"], message });
}

const HERE = new Set(["localhost", "127.0.0.1"]);

/** Checks the environment once; throws one error that lists every fault. An empty variable is an absent one. */
export function readEnv(source: Record<string, string | undefined>): Env {
  const given = Object.fromEntries(Object.entries(source).filter(([, value]) => value !== ""));
  const result = shape.superRefine(testsStayHere).safeParse(given);
  if (result.success) return result.data;
  const faults = result.error.issues.map((issue) => {
    const name = String(issue.path[0]);
    return `  ${name}: ${given[name] === undefined ? "is missing" : issue.message}`;
  });
  throw new Error(
    `The environment is not complete, so nothing was started:\n${faults.join("\n")}\nSet these variables, or run \`npm start\`, which sets up local ones.`,
  );
}

export const env: Env = readEnv(process.env);
