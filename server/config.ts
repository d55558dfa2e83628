import { z } from 'zod';

const port = z.coerce.number().int().min(0).max(65_535);
const onOff = z.enum(['on', 'off']).transform((word) => word === 'on');

/** Every setting, an environment variable each; the README lists them with the same defaults. */
const settings = z.object({
  DATABASE_URL: z.string().regex(/^postgres(ql)?:\/\//, { error: 'must be a postgresql:// address' }),
  /** Owner of the tables, who alone migrates; by default the application does so itself. */
  DATABASE_OWNER_URL: z
    .string()
    .regex(/^postgres(ql)?:\/\//, { error: 'must be a postgresql:// address' })
    .optional(),
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: port.default(4280),
  /** Address that mails and links name; by default the one that is listened on. */
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  NODE_ENV: z.enum(['development', 'production', 'test']).default('development'),
  SESSION_SECRET: z.string().min(32, { error: 'must have at least 32 characters' }).optional(),
  /** Proxies in front of the server, for the address that rate limits count by. */
  TRUST_PROXY_HOPS: z.coerce.number().int().min(0).max(5).default(0),
  WEB_PROCESSES: z.coerce.number().int().min(1).max(64).default(1),
  SMTP_URL: z
    .string()
    .regex(/^smtps?:\/\//, { error: 'must be an smtp:// or smtps:// address' })
    .optional(),
  /** Page of the local mailbox, to be told to whoever starts the application. */
  MAILBOX_URL: z.url().optional(),
  MAIL_FROM: z.string().min(3).default('Lampmeadow <lampmeadow@example.org>'),
  UPLOAD_MAX_MB: z.coerce.number().min(1).max(2000).default(100),
  LAMPMEADOW_DEMO: onOff.default(true),
  LAMPMEADOW_DEVICES_FILE: z.string().min(1).optional(),
  SIMULATOR_CONTROL_URL: z.url().optional(),
  SIMULATOR_CONTROL_SECRET: z.string().min(1).optional(),
  /** Figures for Prometheus, on loopback; nothing is served without it. */
  METRICS_PORT: port.optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent']).default('info'),
});

/** The settings of one process, checked. */
export interface Config {
  readonly databaseUrl: string;
  readonly databaseOwnerUrl: string | null;
  readonly host: string;
  readonly port: number;
  readonly publicUrl: string | null;
  /** Pages travel over HTTPS: cookies are secure and browsers are told to stay with it. */
  readonly isHttps: boolean;
  readonly isTest: boolean;
  readonly sessionSecret: string | null;
  readonly trustProxyHops: number;
  readonly webProcesses: number;
  readonly smtpUrl: string | null;
  readonly mailboxUrl: string | null;
  readonly mailFrom: string;
  readonly uploadMaxBytes: number;
  readonly isDemonstration: boolean;
  readonly devicesFile: string | null;
  readonly simulatorControl: { readonly url: string; readonly secret: string } | null;
  readonly metricsPort: number | null;
  readonly logLevel: string;
}

/**
 * Reads and checks the settings.
 *
 * @param environment - Usually `process.env`.
 * @returns The settings with their defaults.
 * @throws Error that names every variable that is wrong and why.
 */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const parsed = settings.safeParse(given);
  if (!parsed.success) {
    const reasons = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`These settings are not usable: ${reasons.join('; ')}`);
  }
  const values = parsed.data;
  const hasControl =
    values.SIMULATOR_CONTROL_URL !== undefined && values.SIMULATOR_CONTROL_SECRET !== undefined;
  return {
    databaseUrl: values.DATABASE_URL,
    databaseOwnerUrl: values.DATABASE_OWNER_URL ?? null,
    host: values.HOST,
    port: values.PORT,
    publicUrl: values.PUBLIC_URL ?? null,
    isHttps: values.PUBLIC_URL?.startsWith('https:') ?? false,
    isTest: values.NODE_ENV === 'test',
    sessionSecret: values.SESSION_SECRET ?? null,
    trustProxyHops: values.TRUST_PROXY_HOPS,
    webProcesses: values.WEB_PROCESSES,
    smtpUrl: values.SMTP_URL ?? null,
    mailboxUrl: values.MAILBOX_URL ?? null,
    mailFrom: values.MAIL_FROM,
    uploadMaxBytes: Math.round(values.UPLOAD_MAX_MB * 1_000_000),
    isDemonstration: values.LAMPMEADOW_DEMO,
    devicesFile: values.LAMPMEADOW_DEVICES_FILE ?? null,
    simulatorControl: hasControl
      ? { url: values.SIMULATOR_CONTROL_URL ?? '', secret: values.SIMULATOR_CONTROL_SECRET ?? '' }
      : null,
    metricsPort: values.METRICS_PORT ?? null,
    logLevel: values.LOG_LEVEL,
  };
}
