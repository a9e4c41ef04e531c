import type { Asset } from '#server/models/asset';

/** What routes and the demo night ask of the media jobs. */
export interface MediaCalls {
  /**
   * Takes a file that lies on disk (below the data folder's `incoming`), checks what it is, and queues its work.
   * The file is moved or removed. Throws a Fault with a sentence for what is neither picture nor video.
   */
  ingest: (file: IncomingFile) => Promise<Asset>;
  /** Folder of the served files, named after their hashes. */
  mediaFolder: string;
  /** Folder for uploads while they come in. */
  incomingFolder: string;
  /** Resolves when the asset is ready or failed. For the demo night and tests. */
  settled: (assetId: string) => Promise<Asset>;
}

export interface IncomingFile {
  crewId: string;
  path: string;
  /** Name the user's machine gave it. */
  originalName: string;
  /** sha256 of its bytes, hex. */
  hash: string;
  bytes: number;
  addedBy: string | null;
  /** `mark` for a logo; told from the file when left out. */
  kind?: 'clip' | 'still' | 'mark';
}
