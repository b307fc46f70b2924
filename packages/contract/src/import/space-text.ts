/** The number of a space without the panel's name or a word before it: `LP-2-7`, `No. 7`, `Ckt 7`. */
export const bareSpace = (text: string): string =>
  text
    .replace(/^[a-z].*-(?=\d+([ab]|[,/].*)?$)/i, '')
    .replace(/^(no\.?|nr\.?|#|ckt\.?|cct\.?)\s*/i, '')
    .trim();
