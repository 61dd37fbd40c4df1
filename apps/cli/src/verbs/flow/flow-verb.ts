import type { Verb } from '../verb.js';
import { flowEffect } from './effect.js';
import { planFlow, type FlowPlan } from './plan.js';

export const verb: Verb<FlowPlan> = { plan: planFlow, effect: flowEffect };
