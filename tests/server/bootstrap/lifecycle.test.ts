import { EventEmitter } from 'node:events';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { followSignals, STOPPING } from '#server/bootstrap/lifecycle.mjs';

beforeEach(() => {
  vi.spyOn(process.stdout, 'write').mockReturnValue(true);
});

describe('followSignals', () => {
  it('ends what was begun in the opposite order, one after the other', async () => {
    const life = followSignals(new EventEmitter());
    const order: string[] = [];
    for (const name of ['database', 'server', 'fleet']) {
      life.atEnd(async () => {
        order.push(`${name} stops`);
        await Promise.resolve();
        order.push(`${name} stopped`);
      });
    }
    await life.unwind();
    expect(order).toEqual(['fleet', 'server', 'database'].flatMap((name) => [`${name} stops`, `${name} stopped`]));
  });

  it('stops the database although something before it cannot be stopped', async () => {
    const life = followSignals(new EventEmitter());
    const stopDatabase = vi.fn();
    life.atEnd(stopDatabase);
    life.atEnd(() => {
      throw new Error('stuck');
    });
    life.atEnd(() => Promise.reject(new Error('stuck too')));
    await life.unwind();
    expect(stopDatabase).toHaveBeenCalledOnce();
  });

  it('leaves a start that is under way at the first signal, and hurries at the second', async () => {
    const signals = new EventEmitter();
    let now = 10_000;
    const life = followSignals(signals, () => now);
    const waiting = life.orStopping(new Promise(() => undefined));
    life.leaveIfStopping();
    signals.emit('SIGTERM');
    await expect(waiting).rejects.toBe(STOPPING);
    expect(life.leaveIfStopping).toThrow();
    // npm passes on what the terminal sent us already.
    now += 499;
    signals.emit('SIGTERM');
    expect(life.hurry.aborted).toBe(false);
    now += 1;
    signals.emit('SIGINT');
    expect(life.hurry.aborted).toBe(true);
  });

  it('passes results and faults through while nobody wants to stop', async () => {
    const life = followSignals(new EventEmitter());
    await expect(life.orStopping(Promise.resolve(7))).resolves.toBe(7);
    await expect(life.orStopping(Promise.reject(new Error('no')))).rejects.toThrow('no');
  });
});
