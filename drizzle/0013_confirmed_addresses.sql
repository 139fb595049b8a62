-- People who signed up before addresses had to be confirmed keep their sign-in: from now on a person whose
-- address was never confirmed cannot sign in, and makes way for the next sign-up with that address.
UPDATE auth.person SET email_verified = true WHERE NOT email_verified;
