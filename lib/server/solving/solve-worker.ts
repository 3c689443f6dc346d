/** What a thread of the pool runs. */
export { solveDocument as default } from './solve-document';
