/** What a commit of the fold changed, for whoever watches. */
export type FoldNews = {
  /** Pumps of which something changed. */
  readonly pumpIds: readonly string[];
  /** Mails that were put into the outbox. */
  readonly mails: number;
};
