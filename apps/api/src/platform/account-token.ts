import { createHash, createHmac } from 'node:crypto';

/**
 * The secret in the link of a password reset or an invitation. It follows from the token's id, so the queue carries
 * no secret and a mail that is sent again has the same link; the database holds its hash.
 */
export function accountToken(linkSecret: string, tokenId: string): string {
  return createHmac('sha256', linkSecret).update(`account\0${tokenId}`).digest('base64url');
}

export function tokenHash(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
