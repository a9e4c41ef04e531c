export type MailPart = { kind: 'text' | 'link'; text: string };

const address = /https?:\/\/[^\s<>"']+/g;

/** A mail's text, cut at web addresses so that they can be clicked. Only http and https count. */
export const mailParts = (text: string): MailPart[] => {
  const parts: MailPart[] = [];
  let from = 0;
  for (const found of text.matchAll(address)) {
    const link = found[0].replace(/[.,;:)]+$/, '');
    if (found.index > from) parts.push({ kind: 'text', text: text.slice(from, found.index) });
    parts.push({ kind: 'link', text: link });
    from = found.index + link.length;
  }
  if (from < text.length) parts.push({ kind: 'text', text: text.slice(from) });
  return parts;
};
