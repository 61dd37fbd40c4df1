import type { Verb } from '../verb.js';
import { checkEffect } from './effect.js';
import { planCheck, type CheckPlan } from './plan.js';

export const verb: Verb<CheckPlan> = { plan: planCheck, effect: checkEffect };
