import { done, route } from '@/lib/http';
import { CommentChange, changeComment, withdrawComment } from '@/lib/notebooks';

export const PATCH = route(
  { person: 'required', body: CommentChange },
  async ({ person, part, body }) => {
    await changeComment(person, part('id'), part('commentId'), body);
    return done();
  },
);

export const DELETE = route({ person: 'required' }, async ({ person, part }) => {
  await withdrawComment(person, part('id'), part('commentId'));
  return done();
});
