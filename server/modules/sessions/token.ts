import jwt from 'jsonwebtoken';
import { z } from 'zod';

const ISSUER = 'skysheaf';
const AUDIENCE = 'skysheaf-web';
const ALGORITHM = 'HS256';
const Claims = z.object({ sid: z.uuid() });

/** A JSON Web Token that carries only the session's id; the session row decides. */
export const signToken = (sessionId: string, expiresMs: number, secret: string): string =>
  jwt.sign({ sid: sessionId, exp: Math.floor(expiresMs / 1000) }, secret, {
    algorithm: ALGORITHM,
    issuer: ISSUER,
    audience: AUDIENCE,
  });

/** The session's id, or null for a token that is forged, expired or somebody else's. */
export const readToken = (token: string, secret: string, nowMs: number): string | null => {
  try {
    const claims = jwt.verify(token, secret, {
      algorithms: [ALGORITHM],
      issuer: ISSUER,
      audience: AUDIENCE,
      clockTimestamp: Math.floor(nowMs / 1000),
    });
    return Claims.parse(claims).sid;
  } catch {
    return null;
  }
};
