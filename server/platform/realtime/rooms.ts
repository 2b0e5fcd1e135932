import { decide, roleIn, type Actor } from '#shared/policy/policy.ts';
import { ROOMS, roomName, type Room } from '#shared/realtime/events.ts';

/** Rooms of a centre that somebody may be in, by the policy table. A secretary hears of leagues in the rooms of the own ones. */
export function roomsFor(actor: Actor, centre: string): string[] {
  const allowed = (Object.keys(ROOMS) as Room[]).filter((room) => decide(ROOMS[room].permission, actor, { centre }) === 'ok');
  return allowed.flatMap((room) => (room === 'league' && roleIn(actor, centre) === 'secretary' ? ownLeagues(actor, centre) : [roomName(room, centre)]));
}

function ownLeagues(actor: Actor, centre: string): string[] {
  const leagues = actor.kind === 'user' ? (actor.memberships.find((m) => m.centre === centre)?.leagues ?? []) : [];
  return leagues.filter((league) => decide(ROOMS.league.permission, actor, { centre, league }) === 'ok').map((league) => roomName('league', centre, league));
}
