import type { Verb } from '../verb.js';
import { completionEffect } from './effect.js';
import { planCompletion, type CompletionPlan } from './plan.js';

export const verb: Verb<CompletionPlan> = { plan: planCompletion, effect: completionEffect };
