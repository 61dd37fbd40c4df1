import type { Verb } from '../verb.js';
import { modelEffect } from './effect.js';
import { planModel, type ModelPlan } from './plan.js';

export const verb: Verb<ModelPlan> = { plan: planModel, effect: modelEffect };
