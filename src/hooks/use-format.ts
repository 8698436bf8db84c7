import { createContext, useContext } from 'react';
import { createFormat, type Format } from '#src/lib/format/create-format.ts';

/** Before anyone is signed in the browser's own habits stand. */
export const FormatContext = createContext<Format>(
  createFormat({ locale: 'en-US', preferences: { units: 'us', clock: 'locale' } }),
);

/** How the person in front of the screen reads figures. */
export const useFormat = (): Format => useContext(FormatContext);
