import * as z from 'zod';
import { fileOption, globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type DownloadPlan = ReturnType<typeof planDownload>;

/** `download owner/slug[@version] [-o FOLDER]`; the folder has the name of the example where not given. */
export function planDownload(raw: RawOptions, machine: Machine) {
  const schema = z.object({ ...globalOptions(machine), ...registryOptions(), name: z.string(), output: fileOption() });
  return parseOptions(schema, raw);
}
