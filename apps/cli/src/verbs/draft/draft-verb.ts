import type { Verb } from '../verb.js';
import { draftEffect } from './effect.js';
import { planDraft, type DraftPlan } from './plan.js';

export const verb: Verb<DraftPlan> = { plan: planDraft, effect: draftEffect };
