import type { Verb } from '../verb.js';
import { constantsEffect } from './effect.js';
import { planConstants, type ConstantsPlan } from './plan.js';

export const verb: Verb<ConstantsPlan> = { plan: planConstants, effect: constantsEffect };
