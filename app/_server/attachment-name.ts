import 'server-only';

/**
 * The header that makes a browser keep an answer as a file. The name is somebody's text: what a header, a path or a
 * shell would read as its own is taken out of the plain form, and the full form is percent-encoded (RFC 6266, RFC 8187).
 */
export function attachmentName(name: string, extension: string): string {
  const clean = name
    .normalize('NFC')
    .replace(/[\p{C}\p{Zl}\p{Zp}/\\:*?"<>|]+/gu, ' ')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  // By characters, not code units: half a pair cannot be encoded.
  const readable = Array.from(clean).slice(0, 80).join('');
  const full = `${readable === '' ? 'sheet' : readable}.${extension}`;
  const plain = full.normalize('NFKD').replace(/[^\x20-\x7e]/g, '').replace(/[%;]/g, '').trim();
  // `plain` may have lost its whole stem to the letters that ASCII lacks.
  const fallback = plain === `.${extension}` ? `sheet.${extension}` : plain;
  const encoded = encodeURIComponent(full).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`);
  return `attachment; filename="${fallback}"; filename*=UTF-8''${encoded}`;
}
