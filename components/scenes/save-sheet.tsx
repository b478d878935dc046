import { useState } from 'react';
import { ApiProblem } from '../api/problem';
import { Button } from '../ui/button';
import { Field } from '../ui/field';
import { Sheet } from '../ui/sheet';
import { Text } from '../ui/text';

/** Saves a numbered revision with a remark. */
export function SaveSheet({
  number,
  onClose,
  onSave,
}: {
  number: number;
  onClose: () => void;
  onSave: (remark: string) => Promise<unknown>;
}) {
  const [remark, setRemark] = useState('');
  const [working, setWorking] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const save = async () => {
    setWorking(true);
    setFault(null);
    try {
      await onSave(remark);
    } catch (error) {
      setWorking(false);
      setFault(
        error instanceof ApiProblem && error.status === 409
          ? 'Somebody saved a revision meanwhile. Your draft is kept in this browser; reload the page to see theirs.'
          : (error as Error).message,
      );
    }
  };
  return (
    <Sheet title={`Save revision ${number}`} onClose={onClose}>
      <Field
        label={`Remark for revision ${number}`}
        value={remark}
        onChangeText={setRemark}
        onSubmit={() => void save()}
        placeholder="What changed?"
      />
      {fault ? (
        <Text variant="note" color="apricot" role="alert">
          {fault}
        </Text>
      ) : null}
      <Button kind="primary" label="Save" working={working && 'Saving …'} onPress={() => void save()} />
    </Sheet>
  );
}
