import { QueryClient, QueryObserver } from '@tanstack/react-query';
import { expect, it, vi } from 'vitest';
import { readAgain, readUnderwayAgain } from '#src/lib/live/read-again.ts';

/** A query on screen whose answers the test gives, one by one. */
function show(client: QueryClient) {
  const answers: ((value: string) => void)[] = [];
  const observer = new QueryObserver<string>(client, {
    queryKey: ['list', 1],
    queryFn: () => new Promise<string>((resolve) => void answers.push(resolve)),
    staleTime: 60_000,
    retry: false,
  });
  const hide = observer.subscribe(() => undefined);
  return {
    hide,
    asked: () => answers.length,
    data: () => observer.getCurrentResult().data,
    answer: async (value: string) => {
      const asked = answers.length;
      answers.at(-1)?.(value);
      await vi.waitUntil(() => client.isFetching() === 0 || answers.length > asked);
    },
  };
}

it('reads a first answer that was on its way when news came once more', async () => {
  const client = new QueryClient();
  const list = show(client);
  readAgain(client, { queryKey: ['list'] });
  expect(list.asked()).toBe(1);
  await list.answer('before the news');
  expect(list.asked()).toBe(2);
  await list.answer('after the news');
  expect([list.data(), list.asked()]).toEqual(['after the news', 2]);
  list.hide();
});

it('asks anew at once where an answer is shown already', async () => {
  const client = new QueryClient();
  const list = show(client);
  await list.answer('shown');
  readAgain(client, { queryKey: ['list'] });
  expect(list.asked()).toBe(2);
  await list.answer('new');
  expect([list.data(), list.asked()]).toEqual(['new', 2]);
  list.hide();
});

it('leaves what is at rest alone where only answers on their way are in doubt', async () => {
  const client = new QueryClient();
  const list = show(client);
  readUnderwayAgain(client, ['list']);
  await list.answer('before the news');
  expect(list.asked()).toBe(2);
  await list.answer('shown');
  readUnderwayAgain(client, ['list']);
  expect(list.asked()).toBe(2);
  void client.invalidateQueries({ queryKey: ['list'] });
  readUnderwayAgain(client, ['list']);
  expect(list.asked()).toBe(4);
  await list.answer('last');
  expect(list.data()).toBe('last');
  list.hide();
});
