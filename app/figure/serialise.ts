const svgNamespace = 'http://www.w3.org/2000/svg';

// XML 1.0 has no way to write these, not even as references.
// eslint-disable-next-line no-control-regex
const unwritable = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]|\p{Surrogate}/gu;

const references: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  '\t': '&#9;',
  '\n': '&#10;',
  '\r': '&#13;',
};
const refer = (sign: string): string => references[sign] ?? sign;
const escapeText = (text: string): string =>
  text.replace(unwritable, '\ufffd').replace(/[&<>\r]/g, refer);
const escapeValue = (text: string): string =>
  text.replace(unwritable, '\ufffd').replace(/[&<>"\t\n\r]/g, refer);

function written(element: Element, namespace: string): string {
  const attributes = [...element.attributes]
    .filter(({ name }) => name !== 'xmlns')
    .map(({ name, value }) => ` ${name}="${escapeValue(value)}"`)
    .sort();
  const open = element.localName + namespace + attributes.join('');
  let content = '';
  for (const node of element.childNodes) {
    if (node.nodeType === 1) content += written(node as Element, '');
    else if (node.nodeType === 3) content += escapeText(node.nodeValue ?? '');
  }
  return content === '' ? `<${open}/>` : `<${open}>${content}</${element.localName}>`;
}

/**
 * An SVG element as XML text: attributes sorted, the namespace on the root alone, nothing added.
 *
 * The same document gives the same bytes in a browser and in Node. Comments are left out and signs
 * that XML cannot hold become U+FFFD.
 */
export function serialise(root: Element): string {
  return written(root, ` xmlns="${svgNamespace}"`);
}
