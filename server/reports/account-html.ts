import sanitizeHtml from 'sanitize-html';

/** The reporter's words with the few elements that the form offers; everything else is dropped. */
export function toAccountHtml(source: string): string {
  return sanitizeHtml(source, {
    allowedTags: ['p', 'br', 'em', 'strong', 'ul', 'ol', 'li', 'blockquote'],
    allowedAttributes: {},
    allowedSchemes: [],
    disallowedTagsMode: 'discard',
    transformTags: { b: 'strong', i: 'em', div: 'p' },
    nestingLimit: 20,
  }).trim();
}
