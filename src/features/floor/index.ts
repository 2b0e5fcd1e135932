export { BoardContext, useBoard } from './board-context.ts';
export { BoardStore } from './board-store.ts';
export { FloorPage } from './floor-page.tsx';
export { WallPage } from './wall-page.tsx';
