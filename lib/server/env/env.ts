import path from "node:path";
import { z } from "zod";

const flag = z
  .enum(["0", "1"])
  .optional()
  .transform((value) => value === "1");

const optionalUrl = z
  .string()
  .optional()
  .transform((value) => (value === undefined || value.trim() === "" ? null : value.trim()))
  .pipe(z.url().nullable());

const schema = z
  .object({
    NODE_ENV: z.enum(["development", "test", "production"]).default("development"),
    PORT: z.coerce.number().int().min(1).max(65535).default(3000),
    DATA_DIR: z.string().min(1).default("data"),
    DATABASE_URL: z.string().min(1).optional(),
    APP_ORIGIN: z.url().optional(),
    TRIMWAKE_DEMO: flag,
    SMTP_URL: optionalUrl,
    MAIL_FROM: z.string().min(3).default("Trimwake <no-reply@localhost>"),
    MAP_STYLE_URL: optionalUrl,
    TRUSTED_PROXY_HOPS: z.coerce.number().int().min(0).max(5).default(0),
    MIN_FREE_DISK_MB: z.coerce.number().int().min(0).default(500),
  })
  .refine((value) => value.APP_ORIGIN === undefined || new URL(value.APP_ORIGIN).pathname === "/", {
    path: ["APP_ORIGIN"],
    message: "must be an origin such as https://trimwake.example, without a path",
  });

/** The settings of this process, checked once. */
export type Env = {
  readonly mode: "development" | "test" | "production";
  readonly port: number;
  readonly dataDir: string;
  readonly databaseUrl: string;
  readonly origin: string;
  readonly demo: boolean;
  readonly smtpUrl: string | null;
  readonly mailFrom: string;
  readonly mapStyleUrl: string | null;
  readonly trustedProxyHops: number;
  readonly minFreeDiskMb: number;
};

/**
 * Reads settings from a variable table and refuses nonsense.
 *
 * @throws Error with one line per setting that cannot be used.
 */
export function readEnv(variables: Readonly<Record<string, string | undefined>>): Env {
  const parsed = schema.safeParse(variables);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`These settings cannot be used:\n${lines.join("\n")}\nSee .env.example.`);
  }
  const value = parsed.data;
  const dataDir = path.resolve(/* turbopackIgnore: true */ value.DATA_DIR);
  return {
    mode: value.NODE_ENV,
    port: value.PORT,
    dataDir,
    databaseUrl: value.DATABASE_URL ?? `file:${path.join(dataDir, "trimwake.db")}`,
    origin: value.APP_ORIGIN ?? `http://localhost:${value.PORT}`,
    demo: value.TRIMWAKE_DEMO,
    smtpUrl: value.SMTP_URL,
    mailFrom: value.MAIL_FROM,
    mapStyleUrl: value.MAP_STYLE_URL,
    trustedProxyHops: value.TRUSTED_PROXY_HOPS,
    minFreeDiskMb: value.MIN_FREE_DISK_MB,
  };
}

let cached: Env | null = null;

/** The settings of this process. */
export function env(): Env {
  cached ??= readEnv(process.env);
  return cached;
}
