import { Dialog as Chakra, Portal } from '@chakra-ui/react';
import type { ReactNode } from 'react';
import { Button } from './button';

interface DialogProps {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly title: string;
  /** One sentence under the title, read with it. */
  readonly about?: ReactNode;
  readonly children?: ReactNode;
  /** The buttons, the main one first. Without them there is a Close. */
  readonly actions?: ReactNode;
  readonly size?: 'md' | 'lg';
}

/** A question above the page; at the bottom edge on a phone. Escape and a press outside close it. */
export function Dialog({ open, onClose, title, about, children, actions, size = 'md' }: DialogProps) {
  return (
    <Chakra.Root
      open={open}
      onOpenChange={(change) => {
        if (!change.open) onClose();
      }}
      size={size}
      lazyMount
      unmountOnExit
    >
      <Portal>
        <Chakra.Backdrop />
        <Chakra.Positioner>
          <Chakra.Content>
            <Chakra.Title asChild>
              <h2>{title}</h2>
            </Chakra.Title>
            {about ? (
              <Chakra.Description asChild>
                <p>{about}</p>
              </Chakra.Description>
            ) : null}
            {children ? <Chakra.Body>{children}</Chakra.Body> : null}
            <Chakra.Footer>
              {actions ?? (
                <Button look="outline" onClick={onClose}>
                  Close
                </Button>
              )}
            </Chakra.Footer>
          </Chakra.Content>
        </Chakra.Positioner>
      </Portal>
    </Chakra.Root>
  );
}
