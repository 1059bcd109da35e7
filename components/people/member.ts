export interface Member {
  id: string;
  userId: string;
  name: string;
  email: string;
  role: string;
  since: number;
}
