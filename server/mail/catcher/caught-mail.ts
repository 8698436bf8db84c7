/** A mail that was caught. `id` is its place in order of arrival, also the name of its file. */
export type CaughtMail = {
  readonly id: string;
  readonly receivedAt: number;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly messageId: string;
};

/** What it says, read from its file when somebody opens it. */
export type MailContent = { readonly text: string; readonly html: string | undefined };
