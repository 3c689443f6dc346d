'use client';

import { Button } from '../../ui/button';

export const PrintButton = () => (
  <Button look="primary" onClick={() => window.print()}>
    Print
  </Button>
);
