import type { MailHours } from '#server/db/schema/companies.ts';

/** Who may be told of an alarm. */
export type MailPerson = { readonly userId: string; readonly name: string; readonly address: string };

/** Everything a mail about an alarm says of where it is and whom it goes to. */
export type MailPlace = {
  readonly companyId: string;
  readonly companyName: string;
  readonly companyZone: string;
  readonly mailHours: MailHours;
  readonly padId: string;
  readonly padName: string;
  readonly street: string;
  readonly town: string | undefined;
  readonly area: string | undefined;
  readonly zone: string;
  readonly pumpName: string;
  readonly customerName: string | undefined;
  readonly technician: MailPerson | undefined;
  readonly managers: readonly MailPerson[];
};
