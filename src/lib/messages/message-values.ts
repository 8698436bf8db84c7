/** One message: a sentence with `{places}`, or one for each plural form, chosen by `{count}`. */
export type Message = string | { readonly one: string; readonly other: string };

type Places<Text> = Text extends `${string}{${infer Name}}${infer Rest}` ? Name | Places<Rest> : never;

type PlacesOf<M> = M extends { readonly other: infer Other } ? Places<Other> | 'count' : Places<M>;

/** What a message must be given; a place that is not filled, or one too many, does not compile. */
export type ValuesOf<M> = [PlacesOf<M>] extends [never]
  ? []
  : [values: { readonly [Name in PlacesOf<M>]: Name extends 'count' ? number : string | number }];
