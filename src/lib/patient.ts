const TRIES = 30;
const PAUSE_MS = 2000;

/**
 * Fetches a part of the program, and again while the server is away: `lazy` would keep the first failure for good. After a minute it
 * fails: the part is gone, as after a new version, and the page has to be loaded again.
 */
export async function patient<M>(load: () => Promise<M>, pauseMs = PAUSE_MS): Promise<M> {
  for (let tried = 1; ; tried++) {
    try {
      return await load();
    } catch (error) {
      if (tried >= TRIES) throw error;
      await new Promise((done) => setTimeout(done, pauseMs));
    }
  }
}
