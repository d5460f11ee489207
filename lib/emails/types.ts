/** A finished message. `text` is written by hand, not stripped from the HTML. */
export interface Email {
  readonly subject: string;
  readonly html: string;
  readonly text: string;
}

/** `name` may be empty: then the greeting is left without one. All addresses are absolute and built by the sender. */
interface ToPerson {
  readonly name: string;
}

export interface VerifyAddressProps extends ToPerson {
  readonly verifyUrl: string;
  /** "24 hours" */
  readonly validFor: string;
}

export interface AddressTakenProps extends ToPerson {
  readonly signInUrl: string;
  readonly resetUrl: string;
}

export interface ResetPasswordProps extends ToPerson {
  readonly resetUrl: string;
  readonly validFor: string;
}

export interface PasswordChangedProps extends ToPerson {
  /** In the person's own zone: "1 December 2026, 08:12 (Europe/London)". */
  readonly changedAt: string;
  /** 'all' after a reset; 'others' when the person asked for it; 'none' otherwise. */
  readonly signedOut: 'all' | 'others' | 'none';
  readonly resetUrl: string;
}

export interface InvitationProps {
  readonly inviterName: string;
  readonly siteName: string;
  /** "an adviser", "a helper" */
  readonly roleWords: string;
  /** What that role may do, one sentence. */
  readonly roleMeaning: string;
  readonly acceptUrl: string;
  readonly declineUrl: string;
  /** "15 December 2026" */
  readonly expiresOn: string;
}

export interface ReminderItem {
  readonly plotName: string;
  readonly siteName: string;
  /** In words: "20 May 2026". */
  readonly dueOn: string;
  /** Why it is due: "sulfur was spread on 14 May 2025". */
  readonly because: string;
  /** What makes the samples comparable: "15 cores, 0 to 6 in, same laboratory as last time". */
  readonly sampleLikeThis: string;
  readonly plotUrl: string;
  readonly alreadySampledUrl: string;
  readonly snoozeUrl: string;
}

export interface ReminderDueProps extends ToPerson {
  readonly item: ReminderItem;
  readonly unsubscribeUrl: string;
  readonly preferencesUrl: string;
}

export interface ReminderDigestProps extends ToPerson {
  /** The day the digest is sent for, in words. */
  readonly day: string;
  readonly items: readonly ReminderItem[];
  readonly unsubscribeUrl: string;
  readonly preferencesUrl: string;
}

export interface ReportReadyProps extends ToPerson {
  readonly fileName: string;
  readonly siteName: string;
  readonly plotNames: readonly string[];
  /** Day the samples were taken or reported, in words; null when the report does not say. */
  readonly sampledOn: string | null;
  readonly outcome:
    | { readonly kind: 'read'; readonly values: number; readonly doubtful: number }
    | { readonly kind: 'not-read'; readonly sentence: string };
  readonly reviewUrl: string;
  readonly unsubscribeUrl: string;
  readonly preferencesUrl: string;
}

export interface BatchReadyProps extends ToPerson {
  readonly siteName: string;
  /** "1 December 2026" */
  readonly sentOn: string;
  readonly files: number;
  readonly toReview: number;
  /** Of the reports that wait to be reviewed. */
  readonly samples: number;
  readonly notRead: number;
  readonly notTaken: number;
  /** Announced, but never arrived. */
  readonly missing: number;
  readonly batchUrl: string;
  readonly unsubscribeUrl: string;
  readonly preferencesUrl: string;
}
