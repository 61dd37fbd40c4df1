import type { Verb } from '../verb.js';
import { verifyEffect } from './effect.js';
import { planVerify, type VerifyPlan } from './plan.js';

export const verb: Verb<VerifyPlan> = { plan: planVerify, effect: verifyEffect };
