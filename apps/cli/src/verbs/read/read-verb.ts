import type { Verb } from '../verb.js';
import { readEffect } from './effect.js';
import { planRead, type ReadPlan } from './plan.js';

export const verb: Verb<ReadPlan> = { plan: planRead, effect: readEffect };
