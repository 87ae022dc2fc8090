import { nearest } from '../base/nearest.ts';
import type { DeckFaults } from './DeckFaults.ts';
import { deckFormat, type ElementFormat, type ElementName, editorAttributes } from './deckFormat.ts';
import type { XmlElement } from './readXml.ts';

/** Refuses every element and attribute that the format does not have, with the nearest that it has. */
export function checkMarkup(root: XmlElement, faults: DeckFaults): void {
  if (root.name === 'ruleDeck') checkElement(root, 'ruleDeck', faults);
  else refuseElement(root, ['ruleDeck'], faults, 'name the root ruleDeck');
}

function checkElement(element: XmlElement, name: ElementName, faults: DeckFaults): void {
  const format: ElementFormat = deckFormat[name];
  const allowed = name === 'ruleDeck' ? [...format.attributes, ...editorAttributes] : format.attributes;
  for (const attribute of element.attributes.keys()) {
    if (!allowed.includes(attribute)) refuseAttribute(element, attribute, format.attributes, faults);
  }
  // A leaf's stray elements are reported with its text, where they stand.
  if (format.children.length === 0) return;
  for (const child of element.children) {
    if (format.children.includes(child.name)) checkElement(child, child.name as ElementName, faults);
    else refuseElement(child, format.children, faults);
  }
  const stray = faults.strayText(element);
  if (stray !== null) {
    const fix = 'put it into an element, or remove it';
    faults.add(stray.at, element.name, {
      code: 'deck-text',
      expected: 'elements only',
      received: stray.text,
      fix,
    });
  }
}

function refuseElement(
  element: XmlElement,
  known: readonly string[],
  faults: DeckFaults,
  otherwise = 'remove it',
): void {
  const near = nearest(element.name, known);
  const fix = near === null ? otherwise : `did you mean ${near}?`;
  faults.add(element.start, element.name, {
    code: 'unknown-element',
    expected: known.join(', '),
    received: element.name,
    fix,
  });
}

function refuseAttribute(
  element: XmlElement,
  attribute: string,
  known: readonly string[],
  faults: DeckFaults,
): void {
  const near = nearest(attribute, known);
  const fix = near === null ? 'remove it' : `did you mean ${near}?`;
  faults.add(faults.attributeAt(element, attribute), `${element.name}.${attribute}`, {
    code: 'unknown-attribute',
    expected: known.length === 0 ? 'no attributes' : known.join(', '),
    received: attribute,
    fix,
  });
}
