/** How a password will hold, in words. Length counts most (NIST SP 800-63B 5.1.1). */
export const passwordStrength = (text: string): string => {
  if (text === '') return 'At least 12 characters; a few words make a good one.';
  if (text.length < 12) return `${12 - text.length} more to go.`;
  if (new Set(text).size < 6) return 'Long, but the same few letters again and again. Mix it.';
  if (text.length < 16) return 'Good enough. Longer is better.';
  return 'Strong.';
};
