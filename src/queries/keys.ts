/** Every key of the query cache. What the book changes is under `book`, so that one notice refreshes it all. */
export const keys = {
  session: ['session'] as const,
  book: ['book'] as const,
  register: (name: string) => ['book', 'register', name] as const,
  facts: (needed: unknown) => ['book', 'facts', needed] as const,
  one: (what: string, id: string) => ['book', what, id] as const,
  list: (what: string, query: string) => ['book', what, 'list', query] as const,
};
