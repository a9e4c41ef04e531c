/** A random id of 20 letters and digits. Not randomUUID: that wants a secure page, and a venue's plain network has none. */
export const newId = (): string =>
  Array.from(crypto.getRandomValues(new Uint8Array(20)), (byte) => (byte % 36).toString(36)).join('');
