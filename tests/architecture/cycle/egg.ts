import { chicken } from './chicken';

export const egg = () => chicken;
