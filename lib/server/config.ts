import path from "node:path";
import { z } from "zod";

const onOff = (fallback: "on" | "off") =>
  z
    .enum(["on", "off"])
    .default(fallback)
    .transform((value) => value === "on");

const environmentSchema = z.object({
  PORT: z.coerce.number().int().min(0).max(65_535).default(3000),
  STEPWELL_HOST: z.string().min(1).default("127.0.0.1"),
  /** Comma-separated host names, besides localhost, under which browsers may reach Stepwell. */
  STEPWELL_ALLOWED_HOSTS: z
    .string()
    .default("")
    .transform((text) =>
      text
        .split(",")
        .map((host) => host.trim().toLowerCase())
        .filter(Boolean),
    ),
  STEPWELL_DATA: z.string().min(1).default("data"),
  /** `register` lays people, instruments and recipes without past runs. */
  STEPWELL_DEMO: z.enum(["on", "register", "off"]).default("on"),
  STEPWELL_SESSION_SECRET: z.string().min(32, "needs at least 32 characters").optional(),
  STEPWELL_SECURE_COOKIES: onOff("off"),
  STEPWELL_LOG: z.enum(["debug", "info", "warn", "error", "silent"]).default("warn"),
});

export interface Config {
  port: number;
  host: string;
  allowedHosts: string[];
  dataFolder: string;
  demo: "on" | "register" | "off";
  sessionSecret: string | undefined;
  secureCookies: boolean;
  logLevel: "debug" | "info" | "warn" | "error" | "silent";
  isDevelopment: boolean;
}

/** Reads the environment. Throws one Error that names every fault at once. */
export function readConfig(environment: NodeJS.ProcessEnv): Config {
  const parsed = environmentSchema.safeParse(environment);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`Stepwell can't start with these settings:\n${faults.join("\n")}`);
  }
  const values = parsed.data;
  return {
    port: values.PORT,
    host: values.STEPWELL_HOST,
    allowedHosts: ["localhost", "127.0.0.1", "[::1]", ...values.STEPWELL_ALLOWED_HOSTS],
    dataFolder: path.resolve(values.STEPWELL_DATA),
    demo: values.STEPWELL_DEMO,
    sessionSecret: values.STEPWELL_SESSION_SECRET,
    secureCookies: values.STEPWELL_SECURE_COOKIES,
    logLevel: values.STEPWELL_LOG,
    isDevelopment: environment.NODE_ENV !== "production",
  };
}
