/** The settings as the boot reads them; `server/config.ts` says what each means. */
export type BootSettings = {
  port: number;
  dbPort: number;
  dataDir: string;
  databaseUrl: string | null;
  smtpUrl: string | null;
  publicUrl: string | null;
  production: boolean;
  demo: boolean;
};

/** Throws an Error that names each bad variable. */
export function readSettings(env: Record<string, string | undefined>): BootSettings;
