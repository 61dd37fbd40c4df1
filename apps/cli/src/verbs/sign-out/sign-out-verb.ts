import type { Verb } from '../verb.js';
import { signOutEffect } from './effect.js';
import { planSignOut, type SignOutPlan } from './plan.js';

export const verb: Verb<SignOutPlan> = { plan: planSignOut, effect: signOutEffect };
