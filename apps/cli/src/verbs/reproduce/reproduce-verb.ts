import type { Verb } from '../verb.js';
import { reproduceEffect } from './effect.js';
import { planReproduce, type ReproducePlan } from './plan.js';

export const verb: Verb<ReproducePlan> = { plan: planReproduce, effect: reproduceEffect };
