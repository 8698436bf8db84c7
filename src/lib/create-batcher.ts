export type BatcherNeeds<Item> = {
  readonly load: (keys: readonly string[]) => Promise<ReadonlyMap<string, Item>>;
  /** What a key is refused with that the answer does not hold. */
  readonly missing: (key: string) => Error;
  readonly most: number;
  /** Calls back a moment later: what is asked for until then goes together. */
  readonly defer: (run: () => void) => void;
};

type Asker<Item> = {
  readonly key: string;
  readonly resolve: (item: Item) => void;
  readonly reject: (error: unknown) => void;
};

/** One asker at a time on the outside, up to `most` keys a request on the inside. */
export function createBatcher<Item>({
  load,
  missing,
  most,
  defer,
}: BatcherNeeds<Item>): (key: string) => Promise<Item> {
  let waiting: Asker<Item>[] = [];

  const send = (askers: readonly Asker<Item>[]) => {
    load([...new Set(askers.map(({ key }) => key))]).then(
      (items) => {
        for (const { key, resolve, reject } of askers) {
          const item = items.get(key);
          if (item === undefined) reject(missing(key));
          else resolve(item);
        }
      },
      (error: unknown) => {
        for (const { reject } of askers) reject(error);
      },
    );
  };

  const flush = () => {
    const askers = waiting;
    waiting = [];
    for (let start = 0; start < askers.length; start += most) send(askers.slice(start, start + most));
  };

  return (key) =>
    new Promise((resolve, reject) => {
      waiting.push({ key, resolve, reject });
      if (waiting.length === 1) defer(flush);
    });
}
