export interface Cluster {
  /** Started by someone else, who will stop it. */
  readonly wasRunning: boolean;
  /** Makes a database unless it is there. */
  ensureDatabase(database: string): void;
  /** Connection address of one database of the cluster. */
  url(database: string): string;
  stop(mode?: string): void;
  /** Ends the server at once, as a crash would. */
  halt(): void;
  /** Starts it again on the same port. */
  restart(): Promise<void>;
  /** Ends it and deletes its data. */
  remove(): void;
}
export function ensureCluster(wish: { folder: string; testing?: boolean }): Promise<Cluster>;
