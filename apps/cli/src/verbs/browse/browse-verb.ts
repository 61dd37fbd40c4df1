import type { Verb } from '../verb.js';
import { browseEffect } from './effect.js';
import { planBrowse, type BrowsePlan } from './plan.js';

export const verb: Verb<BrowsePlan> = { plan: planBrowse, effect: browseEffect };
