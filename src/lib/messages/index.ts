import { createContext, use } from 'react';
import { en } from './en';

/** Texts lose their exact wording and keep their shape, so that another language can say them otherwise. */
type Wording<T> = T extends (...values: infer V) => string
  ? (...values: V) => string
  : T extends string
    ? string
    : { [K in keyof T]: Wording<T[K]> };

/** The catalogue every language has to fill, entry by entry. */
export type Messages = Wording<typeof en>;

/** A further language is one more entry here; the compiler then asks for every one of its texts. */
const CATALOGUES = { en } satisfies Record<string, Messages>;
export type Language = keyof typeof CATALOGUES;

export const catalogue = (language: Language): Messages => CATALOGUES[language];

/** Provide `catalogue(language)` round the application when there is a choice; English without. */
export const MessagesContext = createContext<Messages>(en);

/** The volunteers' words in the reader's language. */
export const useMessages = (): Messages => use(MessagesContext);
