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
export type ResultId = Id<'result'>;
export type ApplicationId = Id<'application'>;
export type MembershipId = Id<'membership'>;

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
export const asResultId = branded('result');
export const asApplicationId = branded('application');
export const asMembershipId = branded('membership');
export const asInvitationId = branded('invitation');
