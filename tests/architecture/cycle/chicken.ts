import { egg } from './egg';

export const chicken = () => egg;
