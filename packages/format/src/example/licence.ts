import parse from 'spdx-expression-parse';

/** Whether a text is an SPDX licence expression of listed licences, such as `MIT` or `CC-BY-4.0 OR Apache-2.0`. */
export function isLicence(text: string): boolean {
  try {
    parse(text);
  } catch {
    return false;
  }
  return !/\b(LicenseRef|DocumentRef)-/.test(text);
}
