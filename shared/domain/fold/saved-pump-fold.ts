/** What a fold goes on from: what `save` gave, back from storage. */
export type SavedPumpFold = { readonly hot: unknown; readonly learnt: unknown };
