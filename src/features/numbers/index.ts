export { NumbersPage } from './numbers-page.tsx';
