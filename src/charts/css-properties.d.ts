import 'react';

declare module 'react' {
  interface CSSProperties {
    /** Ground under text with a halo (src/index.css). */
    '--halo'?: string;
  }
}
