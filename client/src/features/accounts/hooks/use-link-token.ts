import { useState } from 'react';
import { useLocation } from 'react-router-dom';

/**
 * What stands behind the `#` of a link in a mail: no server and no Referer sees it there. Kept from the first look
 * on, so that a page does not change under its reader.
 */
export function useLinkToken(): string {
  const { hash } = useLocation();
  return useState(() => hash.slice(1))[0];
}
