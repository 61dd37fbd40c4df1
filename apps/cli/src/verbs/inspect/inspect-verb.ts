import type { Verb } from '../verb.js';
import { inspectEffect } from './effect.js';
import { planInspect, type InspectPlan } from './plan.js';

export const verb: Verb<InspectPlan> = { plan: planInspect, effect: inspectEffect };
