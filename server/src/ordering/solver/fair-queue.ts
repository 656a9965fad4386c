import { Piscina } from 'piscina';

type TaskQueue = NonNullable<NonNullable<ConstructorParameters<typeof Piscina>[0]>['taskQueue']>;
type Task = Parameters<TaskQueue['push']>[0];

/** What a task carries under Piscina's symbol so that the queue knows whose it is. */
export type Asked = Readonly<Record<symbol, { readonly asker: string }>>;

/**
 * Whose turn it is in the solving thread: askers take turns, each with the task that they sent first, so that
 * one who sends twenty keeps another waiting for one of them (round robin; Nagle 1985, RFC 970).
 */
export class FairQueue implements TaskQueue {
  /** By asker, in the order of their turns; none is empty. */
  private readonly waiting = new Map<string, Task[]>();

  get size(): number {
    let size = 0;
    for (const tasks of this.waiting.values()) size += tasks.length;
    return size;
  }

  push(task: Task): void {
    const asker = askerOf(task);
    const tasks = this.waiting.get(asker);
    if (tasks === undefined) this.waiting.set(asker, [task]);
    else tasks.push(task);
  }

  shift(): Task | null {
    for (const [asker, [task, ...later]] of this.waiting) {
      // A map keeps the order in which keys came: who was served stands behind the others now.
      this.waiting.delete(asker);
      if (later.length > 0) this.waiting.set(asker, later);
      return task!;
    }
    return null;
  }

  /** Takes back a task for which the thread was not free: its asker is first again, and so is the task. */
  unshift(task: Task): void {
    const asker = askerOf(task);
    const others = [...this.waiting].filter(([other]) => other !== asker);
    const tasks = [task, ...(this.waiting.get(asker) ?? [])];
    this.waiting.clear();
    for (const [each, theirs] of [[asker, tasks] as const, ...others]) this.waiting.set(each, theirs);
  }

  remove(task: Task): void {
    const asker = askerOf(task);
    const left = this.waiting.get(asker)?.filter((other) => other !== task) ?? [];
    if (left.length > 0) this.waiting.set(asker, left);
    else this.waiting.delete(asker);
  }
}

const askerOf = (task: Task): string => (task as unknown as Asked)[Piscina.queueOptionsSymbol]!.asker;
