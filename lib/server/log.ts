import pino from "pino";
import type { Config } from "./config";

export interface Log {
  info(message: string, details?: Record<string, unknown>): void;
  error(message: string, error: unknown): void;
}

/** Structured log on standard output. Secrets are struck out wherever they might stand. */
export function openLog(level: Config["logLevel"]): Log {
  const logger = pino({
    level,
    redact: ["password", "*.password", "cookie", "*.cookie", "headers.cookie", "passwordHash", "*.passwordHash"],
  });
  return {
    info: (message, details = {}) => logger.info(details, message),
    error: (message, error) => logger.error({ err: error }, message),
  };
}
