/**
 * Every refusal that the program gives, with its HTTP status and title: a closed list. The sentence beside it is
 * made where the refusal is, from the figures at hand.
 */
export const PROBLEMS = {
  malformed: { status: 400, title: 'The request can’t be read' },
  not_signed_in: { status: 401, title: 'Not signed in' },
  second_factor_needed: { status: 401, title: 'Second factor needed' },
  second_factor_required: { status: 403, title: 'Second factor required' },
  not_permitted: { status: 403, title: 'Not permitted' },
  role_ended: { status: 403, title: 'Access ended' },
  wrong_pin: { status: 422, title: 'Wrong PIN' },
  cross_site: { status: 403, title: 'Sent from another site' },
  not_found: { status: 404, title: 'Not found' },
  wrong_method: { status: 405, title: 'Wrong method' },
  conflict: { status: 409, title: 'Changed meanwhile' },
  other_person: { status: 409, title: 'Opened as somebody else' },
  not_enough: { status: 409, title: 'Not enough metal' },
  too_large: { status: 413, title: 'Too large' },
  wrong_content_type: { status: 415, title: 'Wrong content type' },
  invalid: { status: 422, title: 'Some entries are not right' },
  key_reused: { status: 422, title: 'Request key used before' },
  tare_over_gross: { status: 422, title: 'Tare over gross' },
  stones_over_net: { status: 422, title: 'Stones over net' },
  date_ahead: { status: 422, title: 'Date ahead' },
  closed_period: { status: 422, title: 'Period closed' },
  below_on_day: { status: 409, title: 'Not there on that day' },
  lot_on_hold: { status: 422, title: 'Lot on hold' },
  lot_not_on_hold: { status: 422, title: 'Lot not on hold' },
  lot_spent: { status: 422, title: 'Lot spent' },
  lot_twice: { status: 422, title: 'Same lot twice' },
  lots_differ: { status: 422, title: 'Lots are not alike' },
  wrong_owner: { status: 422, title: 'Another’s metal' },
  wrong_place: { status: 422, title: 'Not the right place' },
  place_closed: { status: 422, title: 'Place closed' },
  impossible_fineness: { status: 422, title: 'Fineness not possible' },
  pieces_needed: { status: 422, title: 'Pieces not counted' },
  decision_needed: { status: 422, title: 'Decision needed' },
  nothing_to_post: { status: 422, title: 'Nothing to post' },
  not_balanced: { status: 422, title: 'Masses do not balance' },
  not_receiver: { status: 403, title: 'Not the receiver' },
  already_done: { status: 409, title: 'Already done' },
  used_since: { status: 409, title: 'Metal used since' },
  more_back: { status: 422, title: 'More back than out' },
  over_limit: { status: 422, title: 'Beyond a limit' },
  too_many: { status: 429, title: 'Too many tries' },
  failed: { status: 500, title: 'Our own fault' },
  unavailable: { status: 503, title: 'For now not possible' },
} as const satisfies Record<string, { readonly status: number; readonly title: string }>;

export type ProblemCode = keyof typeof PROBLEMS;

/** Whether a word is one of the known refusals. */
export function isProblemCode(code: string): code is ProblemCode {
  return Object.hasOwn(PROBLEMS, code);
}
