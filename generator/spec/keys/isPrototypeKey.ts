/** Names that every object has: as keys they only serve to trick programs, and a typo never makes them. */
export function isPrototypeKey(name: string): boolean {
  return name === 'prototype' || Object.getOwnPropertyNames(Object.prototype).includes(name);
}
