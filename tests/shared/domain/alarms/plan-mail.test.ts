import { describe, expect, it } from 'vitest';
import { type MailPlan, type MailRequest, planMail } from '#shared/domain/alarms/plan-mail.ts';

const MINUTE = 60_000;

/** Plans the mails of alarms one after another, keeping what each answer says to keep. */
function planAll(
  alarms: readonly { at: number; pad?: string; priority?: MailRequest['priority']; hoursBeginAt?: number }[],
): MailPlan[] {
  const pads = new Map<string, MailPlan['pad']>();
  let person: MailPlan['person'] = { sentAt: [] };
  return alarms.map(({ at, pad = 'A', priority = 'soon', hoursBeginAt }) => {
    const plan = planMail({ at, priority, hoursBeginAt, pad: pads.get(pad), person });
    pads.set(pad, plan.pad);
    person = plan.person;
    return plan;
  });
}

const leaves = (plans: readonly MailPlan[]) => plans.map((plan) => plan.leavesAt / MINUTE);

describe('when an alarm’s mail leaves', () => {
  it('sends the first of a pad at once', () => {
    expect(leaves(planAll([{ at: 5 * MINUTE }]))).toEqual([5]);
  });

  it('joins others on that pad within two minutes in one follow-up', () => {
    expect(leaves(planAll([{ at: 0 }, { at: MINUTE }, { at: 1.5 * MINUTE }]))).toEqual([0, 2, 2]);
  });

  it('sends at most one an hour a pad after that', () => {
    expect(leaves(planAll([{ at: 0 }, { at: 10 * MINUTE }, { at: 50 * MINUTE }, { at: 61 * MINUTE }]))).toEqual([
      0, 60, 60, 120,
    ]);
  });

  it('lets an urgent alarm overtake a waiting mail of something less', () => {
    expect(leaves(planAll([{ at: 0 }, { at: 10 * MINUTE }, { at: 11 * MINUTE, priority: 'urgent' }]))).toEqual([
      0, 60, 11,
    ]);
  });

  it('gathers a person’s sixth mail in ten minutes into a digest that later ones join', () => {
    const pads = ['A', 'B', 'C', 'D', 'E', 'F', 'G'];
    const plans = planAll(pads.map((pad, index) => ({ at: index * MINUTE, pad })));

    expect(leaves(plans)).toEqual([0, 1, 2, 3, 4, 10, 11]);
    expect(plans[5]?.kind).toBe('digest');
  });

  it('waits for mail hours unless the alarm is urgent', () => {
    const plans = planAll([
      { at: 0, hoursBeginAt: 420 * MINUTE },
      { at: MINUTE, hoursBeginAt: 420 * MINUTE, priority: 'urgent' },
      { at: 3 * MINUTE, hoursBeginAt: 420 * MINUTE },
    ]);

    expect(leaves(plans)).toEqual([420, 1, 420]);
  });
});
