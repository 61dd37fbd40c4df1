/** Whether a text is an ORCID iD, `0000-0002-1825-0097`, with the right check digit (ISO 7064, MOD 11-2). */
export function isOrcid(text: string): boolean {
  if (!/^\d{4}-\d{4}-\d{4}-\d{3}[\dX]$/.test(text)) return false;
  const digits = text.replaceAll('-', '');
  return checkDigit(digits.slice(0, -1)) === digits.slice(-1);
}

function checkDigit(digits: string): string {
  let total = 0;
  for (const digit of digits) total = (total + Number(digit)) * 2;
  const remainder = (12 - (total % 11)) % 11;
  return remainder === 10 ? 'X' : String(remainder);
}
