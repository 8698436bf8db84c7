import { describe, expect, it } from 'vitest';
import { changeAlarm } from '#tests/src/fake-api/fake-handlers.ts';
import { fakeId } from '#tests/src/fake-api/fake-id.ts';
import { broadcast } from '#tests/src/fake-api/fake-state.ts';
import { createPageBench, eventually, type Opened } from './page-bench.ts';

const bench = createPageBench();
const rows = ({ page }: Opened) => page.getByRole('list', { name: 'Wall of pumps' }).getByRole('listitem');
const row = (opened: Opened, name: string) => rows(opened).filter({ hasText: name });

const openWall = async (options: Parameters<typeof bench.open>[1] = {}, query = '') => {
  const opened = await bench.open(`/fleet${query}`, { role: 'manager', ...options });
  await rows(opened).first().waitFor();
  return opened;
};

/** How many pixels of a row's strip carry ink, by the canvas's own account. */
const inkOf = (opened: Opened, name: string) =>
  row(opened, name)
    .locator('canvas')
    .evaluate((canvas) => {
      const { width, height } = canvas as HTMLCanvasElement;
      const data = (canvas as HTMLCanvasElement).getContext('2d')?.getImageData(0, 0, width, height).data ?? [];
      let ink = 0;
      for (let index = 0; index < data.length; index += 4)
        if ((data[index] ?? 255) < 60 && (data[index + 3] ?? 0) > 200) ink += 1;
      return ink;
    });

describe('the wall', () => {
  it('shows every pump, worst first, with its reason and its figures', async () => {
    const opened = await openWall();
    const first = rows(opened).first();
    expect(await first.textContent()).toMatch(/Tern Court 4[\s\S]*Did not prime, 3 tries/);
    expect(await first.getAttribute('aria-setsize')).toBe('36');
    expect(await row(opened, 'Saltern Way 12').textContent()).toMatch(/program until[\s\S]*1,\d{3}/);
    await opened.page.getByRole('heading', { level: 1, name: 'Fleet, last 24 hours' }).waitFor();
  });

  it('draws ink where pumps ran, and the time of now in the company’s zone', async () => {
    const opened = await openWall();
    await eventually(() => inkOf(opened, 'Quarry Lane 18')).toBeGreaterThan(500);
    expect(await opened.page.getByRole('slider').textContent()).toBe('7:30\u00a0PM');
  });

  it('says of a pad in another zone what time it is there', async () => {
    const opened = await openWall();
    expect(await row(opened, 'Weir House').first().textContent()).toContain('8:30\u00a0PM there');
  });

  it('changes a row as news of it comes, without a reload', async () => {
    const opened = await openWall();
    const pump = opened.state.pumps.find(({ detail }) => detail.padName === 'Saltern Way 12')!;
    pump.detail = { ...pump.detail, now: { ...pump.detail.now!, rpm: 2345, watts: 987 } };
    await eventually(() => opened.state.sockets.size).toBe(1);
    const { pumpId, now, heardAt } = pump.detail;
    broadcast(opened.state, {
      type: 'news',
      cursor: '101',
      runs: [],
      alarms: [],
      pumps: [{ pumpId, heardAt, silentSince: null, alarm: null, now }],
    });
    await row(opened, 'Saltern Way 12').getByText('2,345').waitFor();
    await row(opened, 'Saltern Way 12').getByText('987').waitFor();
  });

  it('watches only what is near the screen', async () => {
    const opened = await openWall({ size: 10_000 });
    const asked = () =>
      opened.state.calls
        .filter((call) => call.startsWith('GET /api/strips'))
        .flatMap((call) => decodeURIComponent(call).match(/00000001-[\w-]+/g) ?? []);
    await eventually(() => asked().length).toBeGreaterThan(10);
    expect(asked().length).toBeLessThan(80);
  });
});

describe('ten thousand pumps', () => {
  it('scroll, page by page, with only a screenful of them on the page', async () => {
    const opened = await openWall({ size: 10_000 });
    for (let step = 0; step < 6; step += 1) {
      await opened.page.mouse.move(700, 600);
      await opened.page.mouse.wheel(0, 3000);
      await eventually(() => rows(opened).count()).toBeLessThan(50);
    }
    await eventually(() => opened.state.calls.filter((call) => call.includes('cursor=')).length).toBeGreaterThan(0);
    const place = Number(await rows(opened).last().getAttribute('aria-posinset'));
    expect(place).toBeGreaterThan(100);
    expect(await rows(opened).last().getAttribute('aria-setsize')).toBe('10000');
  });
});

describe('the crosshair', () => {
  it('puts one question to every row: what then, and why', async () => {
    const opened = await openWall();
    await opened.page.getByRole('slider', { name: 'Time under the cursor' }).focus();
    for (let hour = 0; hour < 8; hour += 1) await opened.page.keyboard.press('PageDown');
    expect(await opened.page.getByRole('slider').getAttribute('aria-valuetext')).toMatch(
      /^Tue, Dec 1, 11:3\d\u00a0AM$/,
    );
    await row(opened, 'Quarry Lane 18').getByText('Input 1 closed: cleaner, until it opens').waitFor();
    expect(await row(opened, 'Tern Court 4').textContent()).toMatch(/Speed rpm 0/);
    await opened.page.keyboard.press('Escape');
    await row(opened, 'Quarry Lane 18').getByText('Input 1 closed, runs program speed').waitFor();
  });

  it('follows a pointer over the strips', async () => {
    const opened = await openWall();
    const box = await row(opened, 'Quarry Lane 18').locator('canvas').boundingBox();
    await opened.page.mouse.move((box?.x ?? 0) + 5, (box?.y ?? 0) + 20);
    expect(await opened.page.getByRole('slider').textContent()).toMatch(/7:\d\d\u00a0PM/);
    await opened.page.mouse.move(10, 10);
    expect(await opened.page.getByRole('slider').textContent()).toBe('7:30\u00a0PM');
  });
});

describe('the address', () => {
  it('holds search, filter and time, so that a link shows the same to a colleague', async () => {
    const opened = await openWall();
    await opened.page.getByRole('searchbox').fill('weir');
    await eventually(() => rows(opened).count()).toBe(2);
    await opened.page.getByRole('link', { name: '7 d' }).click();
    await opened.page.getByRole('link', { name: '‹ earlier' }).click();
    await opened.page.getByRole('heading', { level: 1, name: /^Fleet, .* to Mon, Nov 30$/ }).waitFor();
    const link = opened.page.url();
    expect(new URL(link).search).toBe('?q=weir&range=7d&day=2026-11-30');
    await opened.page.goto(link);
    await opened.page.getByRole('heading', { level: 1, name: /^Fleet, .* to Mon, Nov 30$/ }).waitFor();
    await eventually(() => rows(opened).count()).toBe(2);
  });

  it('tells of the day it names, not of now, and says what is of now all the same', async () => {
    const { page } = await bench.open('/fleet?day=2026-11-30', { role: 'manager' });
    await page.getByRole('heading', { level: 1, name: 'Fleet, Mon, Nov 30' }).waitFor();
    await page.getByText('Now:', { exact: true }).waitFor();
    await page.getByRole('link', { name: /Quarry Lane 18/ }).waitFor();
    await eventually(() => page.getByText('Input 1 closed, runs program speed').count()).toBe(0);
  });

  it('narrows by a total and widens by the same click', async () => {
    const opened = await openWall();
    await opened.page.getByRole('link', { name: /urgent/ }).click();
    await eventually(() => rows(opened).count()).toBe(1);
    await opened.page.getByRole('link', { name: /urgent/ }).click();
    await eventually(() => rows(opened).count()).toBeGreaterThan(5);
  });
});

describe('a row’s table', () => {
  it('opens by keyboard, and the focus comes back', async () => {
    const opened = await openWall();
    const button = opened.page.getByRole('button', { name: 'Runs of Quarry Lane 18, Filter pump as a table' });
    await button.focus();
    await opened.page.keyboard.press('Enter');
    const dialog = opened.page.getByRole('dialog');
    await eventually(() => dialog.getByRole('row').count()).toBeGreaterThan(4);
    expect(await dialog.textContent()).toContain('Prime');
    await opened.page.keyboard.press('Escape');
    expect(await button.evaluate((element) => element === document.activeElement)).toBe(true);
  });
});

describe('the order', () => {
  it('stands still under the pointer and offers to be sorted again', async () => {
    const opened = await openWall();
    await rows(opened).nth(4).hover();
    const quiet = opened.state.pumps.find(({ detail }) => detail.padName === 'Quarry Lane 18')!;
    changeAlarm(opened.state, quiet.alarm!.id, { priority: 'note' });
    await opened.page.getByRole('button', { name: 'The order has changed. Sort again' }).waitFor();
    expect(await rows(opened).nth(1).textContent()).toContain('Quarry Lane 18');
    await opened.page.getByRole('button', { name: 'The order has changed. Sort again' }).click();
    await eventually(() => rows(opened).nth(1).textContent()).not.toContain('Quarry Lane 18');
  });
});

describe('when something is wrong', () => {
  it('is ruled paper without ink while it loads', async () => {
    const { page } = await bench.open('/fleet', {
      role: 'manager',
      prepare: (state) => state.failures.set('/api/pumps', 'hang'),
    });
    await page.locator('[aria-busy=true] .ruled').first().waitFor();
    expect(await page.getByText('Loading').first().isVisible()).toBe(true);
  });

  it('says what to do, and tries again when asked', async () => {
    const { page, state } = await bench.open('/fleet', {
      role: 'manager',
      prepare: (each) => each.failures.set('/api/pumps', 'internal'),
    });
    await page.getByRole('alert').getByText('The server made a mistake.').waitFor();
    state.failures.clear();
    await page.getByRole('button', { name: 'Try again' }).click();
    await page.getByText('Tern Court 4').first().waitFor();
  });

  it('says what would be here when there is nothing, and when nothing matches', async () => {
    const nothing = await bench.open('/fleet', { role: 'manager', size: 0 });
    await nothing.page.getByText('A pump appears here as soon as').waitFor();
    const none = await bench.open('/fleet?q=nowhere', { role: 'manager' });
    await none.page.getByRole('link', { name: 'Show all' }).click();
    await none.page.getByText('Tern Court 4').first().waitFor();
  });

  it('is not for a homeowner', async () => {
    const { page } = await bench.open('/fleet', { role: 'homeowner' });
    await page.getByRole('heading', { level: 1, name: 'This page is not for your role.' }).waitFor();
    await page.getByRole('link', { name: 'Go to the first page' }).click();
    await page.waitForURL(/my-pump/);
  });

  it('fades when the connection is lost, says since when, and catches up by itself', async () => {
    const opened = await openWall();
    await opened.page.getByText('live', { exact: true }).waitFor();
    const [socket] = [...opened.state.sockets];
    await opened.page.context().setOffline(true);
    socket?.terminate();
    await opened.page.getByText('No connection to Millrace.').waitFor();
    await eventually(() =>
      row(opened, 'Tern Court 4')
        .locator('canvas')
        .evaluate((canvas) => getComputedStyle(canvas).opacity),
    ).toBe('0.45');
    const alarm = opened.state.pumps[0]!.alarm!;
    opened.state.pumps[0]!.detail = {
      ...opened.state.pumps[0]!.detail,
      alarm: { ...opened.state.pumps[0]!.detail.alarm!, acknowledged: true },
    };
    expect(alarm.state).toBe('unacknowledged');
    await opened.page.context().setOffline(false);
    await opened.page.getByText('live', { exact: true }).waitFor();
    await row(opened, 'Tern Court 4').getByRole('img', { name: 'urgent', exact: true }).waitFor();
    expect(opened.state.calls.some((call) => call.startsWith('GET /api/changes?since=100'))).toBe(true);
  });

  it('breaks a very long name rather than the page', async () => {
    const opened = await openWall({
      width: 390,
      prepare: (state) => {
        const [first] = state.pumps;
        if (first !== undefined)
          first.detail = { ...first.detail, padName: 'Llanfairpwllgwyngyllgogerychwyrndrobwll-'.repeat(4) };
      },
    });
    expect(await opened.page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});

it('opens a pump’s page from its row', async () => {
  const opened = await openWall();
  await opened.page.getByRole('link', { name: /Quarry Lane 18/ }).click();
  await opened.page.waitForURL(`**/pumps/${fakeId('pump', 2)}`);
  await opened.page.getByRole('heading', { level: 1, name: /Quarry Lane 18/ }).waitFor();
  await opened.page.waitForFunction(() => /Quarry Lane 18.*rpm/.test(document.activeElement?.textContent ?? ''));
});
