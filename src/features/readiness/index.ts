export { ReadinessPage } from './readiness-page.tsx';
export { SessionPage } from './session-page.tsx';
