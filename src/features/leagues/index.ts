export { LeaguePage } from './league-page.tsx';
export { LeaguesPage } from './leagues-page.tsx';
