/**
 * Passwords of eight characters or more that are tried first by anybody who guesses: lists of leaked passwords agree on
 * these (from memory). NIST SP 800-63B, 5.1.1.2, asks that such passwords be refused. All in lower case.
 */
export const COMMON_PASSWORDS: ReadonlySet<string> = new Set(
  `12345678 123456789 1234567890 12345678910 0123456789 0987654321 987654321 87654321 123123123 12341234 11111111 111111111
  1111111111 00000000 0000000000 88888888 99999999 66666666 55555555 22222222 77777777 12121212 11223344 1122334455 112233445566
  147258369 741852963 159753456 123654789 789456123 123456789a 1234567a 12345678a a1234567 a12345678 a123456789 abcd1234 1234abcd
  abc12345 abc123456 abcdefgh abcdefg1 abcdef123 aa123456 aa12345678 aaaaaaaa asdfasdf asdfghjk asdfghjkl asdf1234 asd123456
  password password1 password2 password12 password123 password1234 password12345 passw0rd passw0rd1 p@ssw0rd p@ssword pa$$word
  pass1234 passpass passport password! password1! password01 password11 mypassword newpassword changeme changeme1 changeme123
  qwertyui qwertyuiop qwerty12 qwerty123 qwerty1234 qwerty12345 qwertyqwerty qwerasdf qwer1234 qazwsxedc 1qaz2wsx 1qazxsw2 zaq12wsx
  1q2w3e4r 1q2w3e4r5t 1q2w3e4r5t6y q1w2e3r4 q1w2e3r4t5 zxcvbnm1 zxcvbnm123 iloveyou iloveyou1 iloveyou2 iloveyou123 ilovemusic
  sunshine sunshine1 princess princess1 football football1 baseball baseball1 basketball superman superman1 batman123 trustno1
  whatever whatever1 welcome1 welcome12 welcome123 letmein1 letmein123 letmeinnow monkey123 dragon123 master123 shadow123 hello123
  hello1234 hellohello admin123 admin1234 administrator adminadmin root1234 test1234 testtest test12345 temp1234 guest123 user1234
  computer internet michael1 michelle jennifer jessica1 charlie1 starwars pokemon1 liverpool liverpool1 chelsea1 arsenal1 barcelona
  november december february september october1 summer123 winter123 spring123 blink182 babygirl1 butterfly chocolate samsung123
  google123 facebook1 secret123 freedom1 corvette mercedes maverick midnight mustang1 nicole123 scorpion sapphire victoria
  drummer1 drumming percussion composer teacher1 student1`
    .split(/\s+/)
    .filter((word) => word !== ''),
);
