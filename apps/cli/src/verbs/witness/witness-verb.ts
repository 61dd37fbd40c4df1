import type { Verb } from '../verb.js';
import { witnessEffect } from './effect.js';
import { planWitness, type WitnessPlan } from './plan.js';

export const verb: Verb<WitnessPlan> = { plan: planWitness, effect: witnessEffect };
