/** A text of others without characters that would move the cursor, change colours or turn the direction of writing. */
export function plainText(text: string): string {
  return text.replaceAll(/[\p{Cc}\p{Cf}]/gu, ' ');
}
