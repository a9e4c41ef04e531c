/** A PostgreSQL server that this process uses; see cluster.mjs. */
export interface Cluster {
  /** Address of the database `lampyrid`, its owner and password in it. */
  url: string;
  port: number;
  /** True when another process had started it; then it's not ours to stop. */
  adopted: boolean;
  /** True when the cluster was made by this call. */
  made: boolean;
  /** Process id of the postmaster at this moment. */
  pid(): number;
  /** Stops it when this process started it. */
  stop(): Promise<void>;
}

export function startCluster(options: {
  home: string;
  pgHome?: string;
  settings?: Record<string, string>;
}): Promise<Cluster>;
