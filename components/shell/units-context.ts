'use client';

import { createContext, useContext } from 'react';

/** The units that the signed-in person reads and types in, by quantity; see lib/units. */
export const UnitsContext = createContext<Record<string, string>>({});

export const useUnitChoice = (): Record<string, string> => useContext(UnitsContext);
