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

/** The words of the page; a further language is another value of type `Messages`, provided round the application. */
const MessagesContext = createContext<Messages>(en);

/** The volunteers' words in the reader's language. */
export const useMessages = (): Messages => use(MessagesContext);
