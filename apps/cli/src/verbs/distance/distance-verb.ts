import type { Verb } from '../verb.js';
import { distanceEffect } from './effect.js';
import { planDistance, type DistancePlan } from './plan.js';

export const verb: Verb<DistancePlan> = { plan: planDistance, effect: distanceEffect };
