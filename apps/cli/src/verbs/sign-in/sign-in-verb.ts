import type { Verb } from '../verb.js';
import { signInEffect } from './effect.js';
import { planSignIn, type SignInPlan } from './plan.js';

export const verb: Verb<SignInPlan> = { plan: planSignIn, effect: signInEffect };
