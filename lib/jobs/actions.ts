'use server';
import { shopAction } from '@/lib/access/action';
import {
  closeJob as closeJobCommand,
  createJob as createJobCommand,
  markSurveyDone,
  setDepositRule,
} from './commands';
import {
  type CloseJobInput,
  closeJobForm,
  type DepositRuleInput,
  depositRuleForm,
  type NewJobForm,
  newJobForm,
  type SurveyDoneInput,
  surveyDoneForm,
} from './schema';

interface Meta {
  idempotencyKey?: string;
}

const create = shopAction({
  name: 'jobs.createJob',
  permission: 'job:open',
  schema: newJobForm,
  run: createJobCommand,
});
const done = shopAction({
  name: 'jobs.finishSurvey',
  permission: 'work:edit',
  schema: surveyDoneForm,
  run: markSurveyDone,
});
const rule = shopAction({
  name: 'jobs.changeDepositRule',
  permission: 'invoice:edit',
  schema: depositRuleForm,
  run: setDepositRule,
});
const close = shopAction({
  name: 'jobs.closeJob',
  permission: 'invoice:edit',
  schema: closeJobForm,
  run: closeJobCommand,
});

export async function createJob(shopId: string, input: NewJobForm, meta?: Meta) {
  return create(shopId, input, meta);
}
export async function finishSurvey(shopId: string, input: SurveyDoneInput, meta?: Meta) {
  return done(shopId, input, meta);
}
export async function changeDepositRule(shopId: string, input: DepositRuleInput, meta?: Meta) {
  return rule(shopId, input, meta);
}
export async function closeJob(shopId: string, input: CloseJobInput, meta?: Meta) {
  return close(shopId, input, meta);
}
