import type { Verb } from '../verb.js';
import { withdrawEffect } from './effect.js';
import { planWithdraw, type WithdrawPlan } from './plan.js';

export const verb: Verb<WithdrawPlan> = { plan: planWithdraw, effect: withdrawEffect };
