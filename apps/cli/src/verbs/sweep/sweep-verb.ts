import type { Verb } from '../verb.js';
import { sweepEffect } from './effect.js';
import { planSweep, type SweepPlan } from './plan.js';

export const verb: Verb<SweepPlan> = { plan: planSweep, effect: sweepEffect };
