import 'next-auth';
import 'next-auth/jwt';

declare module 'next-auth' {
  interface User {
    organizationId: string;
  }
  interface Session {
    organizationId: string;
    personId: string;
    signedInAt: number;
  }
}

declare module 'next-auth/jwt' {
  interface JWT {
    organizationId: string;
    personId: string;
    signedInAt: number;
  }
}
