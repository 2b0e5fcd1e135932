/** The private MariaDB of one folder, in use by this process. */
export type DatabaseInUse = {
  /** `mysql://…` of the database `lanewright`; the account may make others named `lanewright_…`. */
  url: string;
  port: number;
  /** Of the server's process now; 0 when it isn't running. */
  pid(): number;
  /** Stops the server unless another process uses it. */
  release(): Promise<void>;
};

export function useDatabase(
  base: string,
  options?: { port?: number; small?: boolean; fast?: boolean; say?: (text: string) => void },
): Promise<DatabaseInUse>;
