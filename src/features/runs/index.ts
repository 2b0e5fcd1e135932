export { PatternPage } from './pattern-page.tsx';
export { PatternsPage } from './patterns-page.tsx';
export { RunsPage } from './runs-page.tsx';
