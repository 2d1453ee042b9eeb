import type { User as ProductUser } from '#server/policy/user.ts';

declare global {
  // Passport's own way to say what `request.user` is.
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- passport's interface is extended, not renamed
    interface User extends ProductUser {}
  }
}
