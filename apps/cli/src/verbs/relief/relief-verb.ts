import type { Verb } from '../verb.js';
import { reliefEffect } from './effect.js';
import { planRelief, type ReliefPlan } from './plan.js';

export const verb: Verb<ReliefPlan> = { plan: planRelief, effect: reliefEffect };
