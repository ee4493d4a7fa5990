'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button, type ButtonLook } from '@/components/ui/button';
import { Dialog, DialogCancel } from '@/components/ui/dialog';
import { Notice } from '@/components/ui/notice';
import type { ActionResult } from '@/lib/domain/dto';

interface ConfirmButtonProps {
  /** What the button in the page says. */
  label: string;
  /** What a screen reader hears where several such buttons stand in a list. */
  accessibleLabel?: string;
  title: string;
  /** What will happen, and what will not. */
  consequence: string;
  confirmLabel: string;
  action: () => Promise<ActionResult<unknown>>;
  look?: ButtonLook;
  onDone?: () => void;
}

/** A button for what cannot be taken back: says what will happen, then does it. */
export function ConfirmButton(props: ConfirmButtonProps) {
  const { label, accessibleLabel, title, consequence, confirmLabel, action, look = 'quiet', onDone } = props;
  const router = useRouter();
  const [isOpen, setIsOpen] = useState(false);
  const [isSending, setIsSending] = useState(false);
  const [failure, setFailure] = useState('');
  const confirm = async () => {
    setIsSending(true);
    setFailure('');
    try {
      const result = await action();
      if (result.ok) {
        setIsOpen(false);
        onDone?.();
        router.refresh();
      } else setFailure(result.message);
    } catch {
      setFailure('The server cannot be reached. Nothing was changed.');
    }
    setIsSending(false);
  };
  return (
    <Dialog
      open={isOpen}
      onOpenChange={(open) => {
        setIsOpen(open);
        setFailure('');
      }}
      title={title}
      description={consequence}
      trigger={
        <Button look={look} aria-label={accessibleLabel}>
          {label}
        </Button>
      }
    >
      {failure && <Notice tone="attention">{failure}</Notice>}
      <div className="flex flex-wrap gap-3">
        <Button look="attention" onClick={() => void confirm()} disabled={isSending}>
          {isSending ? 'Sending…' : failure ? 'Try again' : confirmLabel}
        </Button>
        <DialogCancel />
      </div>
    </Dialog>
  );
}
