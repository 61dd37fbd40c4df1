import type { Verb } from '../verb.js';
import { compareEffect } from './effect.js';
import { planCompare, type ComparePlan } from './plan.js';

export const verb: Verb<ComparePlan> = { plan: planCompare, effect: compareEffect };
