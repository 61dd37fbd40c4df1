import * as z from 'zod';
import { fileOption, globalOptions, modelOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type InspectPlan = ReturnType<typeof planInspect>;

/** `inspect M [--set n=3] [--svg FILE]`; `svg` is null where not given. */
export function planInspect(raw: RawOptions, machine: Machine) {
  return parseOptions(z.object({ ...globalOptions(machine), ...modelOptions(), svg: fileOption() }), raw);
}
