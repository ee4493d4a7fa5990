// The people of the tests. Those of the demo practice come from the seed; the others sign up under names of their own.

/** A person who can sign in. */
export interface Person {
  name: string;
  email: string;
  password: string;
}

/** A person no other test knows. */
export function newPerson(name: string): Person {
  const slug = name.toLowerCase().replace(/\W+/g, '.');
  return {
    name,
    email: `${slug}.${Date.now().toString(36)}@harrow.example`,
    password: 'a long enough sentence',
  };
}
