import { z } from 'zod';

/** Every id is a UUID made by the server. */
export const Id = z.uuid();
export type Id = z.infer<typeof Id>;

/** An instant: whole milliseconds since the Unix epoch, UTC, like the wire's `t`. */
export const Instant = z.number().int().min(0).max(8_640_000_000_000_000);
export type Instant = z.infer<typeof Instant>;

/** An instant in a query string. */
export const InstantParam = z.coerce.number().int().min(0).max(8_640_000_000_000_000);

export const ROLES = ['manager', 'technician', 'homeowner'] as const;
export const Role = z.enum(ROLES);
export type Role = z.infer<typeof Role>;

/** Opaque place in a list; pass it back as it came. */
export const Cursor = z.string().min(1).max(400);

export const pageQuery = (largest: number, usual: number) => ({
  cursor: Cursor.optional(),
  limit: z.coerce.number().int().min(1).max(largest).default(usual),
});

/** One page of a list. `nextCursor` is null on the last page. */
export const pageOf = <Item extends z.ZodType>(item: Item) =>
  z.object({ items: z.array(item), nextCursor: Cursor.nullable() });

/** A list in a query string: `a,b,c`. */
export const listParam = <Item extends z.ZodType<unknown, string>>(item: Item, largest: number) =>
  z
    .string()
    .transform((text) => (text === '' ? [] : text.split(',')))
    .pipe(z.array(item).max(largest));
