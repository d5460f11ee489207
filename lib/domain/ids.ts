/**
 * Branded identifiers. A swap of two of them does not compile; at run time they are plain strings.
 * The constructors are the one checked boundary: an empty string is refused.
 */
declare const brand: unique symbol;
export type Id<Name extends string> = string & { readonly [brand]: Name };

export type SiteId = Id<'site'>;
export type PlotId = Id<'plot'>;
export type PersonId = Id<'person'>;
export type LaboratoryId = Id<'laboratory'>;
export type ReportId = Id<'report'>;
export type ReportSampleId = Id<'report-sample'>;
export type ReadingRowId = Id<'reading-row'>;
export type SampleId = Id<'sample'>;
export type ResultId = Id<'result'>;
export type ApplicationId = Id<'application'>;
export type PlanId = Id<'plan'>;
export type EffectCheckId = Id<'effect-check'>;
export type ReminderRuleId = Id<'reminder-rule'>;
export type ReminderId = Id<'reminder'>;
export type MembershipId = Id<'membership'>;
export type InvitationId = Id<'invitation'>;

const branded =
  <Name extends string>(name: Name) =>
  (text: string): Id<Name> => {
    if (text.length === 0) throw new TypeError(`An empty text is no ${name} id.`);
    return text as Id<Name>;
  };

export const asSiteId = branded('site');
export const asPlotId = branded('plot');
export const asPersonId = branded('person');
export const asLaboratoryId = branded('laboratory');
export const asReportId = branded('report');
export const asReportSampleId = branded('report-sample');
export const asReadingRowId = branded('reading-row');
export const asSampleId = branded('sample');
export const asResultId = branded('result');
export const asApplicationId = branded('application');
export const asPlanId = branded('plan');
export const asEffectCheckId = branded('effect-check');
export const asReminderRuleId = branded('reminder-rule');
export const asReminderId = branded('reminder');
export const asMembershipId = branded('membership');
export const asInvitationId = branded('invitation');
