/** A size as people read it: “840 kB”, “12.4 MB”. Decimal units, as disks are sold. */
export const bytesWords = (bytes: number): string => {
  if (bytes < 1e6) return `${Math.max(1, Math.round(bytes / 1e3))} kB`;
  if (bytes < 1e9) return `${(bytes / 1e6).toFixed(1)} MB`;
  return `${(bytes / 1e9).toFixed(2)} GB`;
};

/** A length as people read it: “7.2 s”, “3:05”. */
export const lengthWords = (seconds: number): string => {
  if (seconds < 60) return `${seconds.toFixed(1)} s`;
  return `${Math.floor(seconds / 60)}:${String(Math.floor(seconds % 60)).padStart(2, '0')}`;
};
