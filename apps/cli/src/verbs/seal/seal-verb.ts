import type { Verb } from '../verb.js';
import { sealEffect } from './effect.js';
import { planSeal, type SealPlan } from './plan.js';

export const verb: Verb<SealPlan> = { plan: planSeal, effect: sealEffect };
