import { useState, type ReactNode } from 'react';
import { Button, type ButtonProps } from '#src/components/Button.tsx';
import { Dialog, DialogButtons } from '#src/components/Dialog.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextArea } from '#src/components/TextInput.tsx';

interface TextDialogProps {
  readonly open: boolean;
  readonly onOpenChange: (open: boolean) => void;
  readonly title: string;
  readonly description: ReactNode;
  readonly label: string;
  /** Said beside the field when it is left empty; absent: the text may stay empty. */
  readonly required?: string;
  readonly action: string;
  readonly look?: NonNullable<ButtonProps['look']>;
  readonly error: Error | null;
  readonly busy: boolean;
  readonly onConfirm: (text: string) => void;
}

/** A decision that carries a text: accept, return, withdraw. */
export function TextDialog(props: TextDialogProps) {
  const { open, onOpenChange, title, description, label, required, action, error, busy } = props;
  const [text, setText] = useState('');
  const [tried, setTried] = useState(false);
  const lacking = required !== undefined && text.trim() === '';
  return (
    <Dialog open={open} onOpenChange={onOpenChange} title={title} description={description}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (!lacking) props.onConfirm(text.trim());
        }}
      >
        <TextArea
          label={label}
          aside={required === undefined ? 'optional' : undefined}
          error={tried && lacking ? required : undefined}
          value={text}
          maxLength={4000}
          onChange={(event) => setText(event.target.value)}
        />
        {error && (
          <div className="mt-3">
            <ErrorNote error={error} />
          </div>
        )}
        <DialogButtons>
          <Button onClick={() => onOpenChange(false)}>Cancel</Button>
          <Button type="submit" look={props.look ?? 'primary'} busy={busy}>
            {action}
          </Button>
        </DialogButtons>
      </form>
    </Dialog>
  );
}
