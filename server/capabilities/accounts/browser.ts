import Bowser from 'bowser';

/** What people call the browser and its system; null for a program that is no browser. `agent`: the User-Agent it sent. */
export function browserOf(agent: string): { browser: string | null; system: string | null } {
  if (agent.trim() === '') return { browser: null, system: null };
  const { browser, os } = Bowser.parse(agent);
  return { browser: browser.name || null, system: os.name || null };
}
