import type { Verb } from '../verb.js';
import { publishEffect } from './effect.js';
import { planPublish, type PublishPlan } from './plan.js';

export const verb: Verb<PublishPlan> = { plan: planPublish, effect: publishEffect };
