import type { Sentences } from './sentences.ts';

/** Why an event was set aside, from its reason code: `code` or `code:/place`. */
export function setAsideSentence(reason: string): string {
  const [code = reason, place] = reason.split(':', 2);
  const at = place ? ` (${place})` : '';
  switch (code) {
    case 'event.not-an-object': return 'This is no event at all.';
    case 'event.id-missing': return 'It has no id by which a repeat could be told.';
    case 'event.invalid': return `An attribute doesn’t fit CloudEvents 1.0${at}.`;
    case 'type.unknown': return 'Events of this type aren’t known.';
    case 'data.invalid': return `Its data doesn’t fit its type${at}.`;
    case 'lane.unknown': return 'The centre has no such lane.';
    case 'time.too-old': return 'It happened more than 7 days before it arrived.';
    case 'time.in-future': return 'It lies more than 5 minutes in the future.';
    default: return reason;
  }
}

export const setAsideText = {
  title: 'Events set aside',
  none: 'Nothing was set aside.',
  apply: 'Apply',
  explain: 'They are kept whole. Mend the cause, then apply them: they take their own place in time.',
} as const;

export const refusals: Sentences = {
  'gateway.key-required': () => 'A gateway key is needed (Authorization: Bearer …), and this isn’t one.',
  'gateway.key-revoked': () => 'This key has been revoked. Make a new one in Settings.',
  'gateway.too-many': () => 'More than 50 requests a second with one key. Send events in batches.',
  'events.too-large': ({ what, max }) => `Too large: at most ${String(max)} ${String(what)}.`,
  'events.type': () => 'Content-Type must be application/cloudevents+json or application/cloudevents-batch+json, in UTF-8, not compressed.',
  'events.not-json': () => 'The body is not JSON in UTF-8.',
  'events.not-cloudevents': () => 'The body is not a CloudEvent (one object), or not a batch of them (an array).',
  'events.gateway-time': () => 'The header Gateway-Time is not an RFC 3339 timestamp.',
};
