/**
 * The first that anybody tries: words and keyboard walks that head published counts of leaked passwords,
 * and this trade's own. Compared in lower case, with and without figures and marks at the ends, so that
 * "Password2026!" is found under "password".
 */
const WORDS = `
00000000000 0123456789 0192837465 0987654321 1029384756 1111111111 1111122222 11223344
1122334455 112233445566 1212121212 123123123123 12344321 1234512345 1234554321 12345654321
123456654321 1234567890 1234567891 12345678910 123456789101112 1234567899 1234qwerasdf
123abc123abc 123qweasdzxc 1357924680 147258369 14725836900 1a2b3c4d5e 1q2w3e4r5t 1q2w3e4r5t6y
1q2w3e4r5t6y7u 1qaz1qaz1qaz 1qaz2wsx3edc 1qazxsw23edc 2468013579 2718281828 3141592653
31415926535 3141592654 5544332211 741852963 7418529630 789456123 7894561230 9638527410
9876543210 a1b2c3d4e5 a1b2c3d4e5f6 aabbcc abc123abc123 abcabc abcd1234abcd abcdef abcdefg
abcdefghij admin adminadmin administrator adminpassword alexander alexandra amanda america
andrew asd123asd123 asdfasdf asdfgh asdfghjkl asdfjkl ashley australia autumn azerty
azertyuiop babyboy babygirl baseball basketball beautiful bestfriend
bestfriends bismar blessed blueberry butterfly california callofduty canada celtic changeme
changemenow changethis charlie cheesecake children chocolate christian christina
christopher computer computers coordinator correcthorsebatterystaple counterstrike daniel
december default defaultpassword dragon dragonball elizabeth england everything family
father february florida football forever fortnite freedom friday friendship germany godisgood
godislove grandma guest guestguest happybirthday hello hellohello hellokitty hellothere
helloworld helloyou hockey iloveher ilovehim iloveme ilovemyself iloveu iloveyou
iloveyouforever iloveyousomuch internet ireland january jennifer jessica jesuschrist
jesusislord jesuslovesme jordan juventus leagueoflegends letmein letmeinnow lkjhgfdsa
london lovelove lovely loveyou manchester manunited manutd master matthew maytheforcebewithyou
michael michelle minecraft mnbvcxz monday monkey mother myfamily mylove mypassword
mysecret mysunshine newpassword newyork nicole nobody nosecret nothing november
october oldpassword opensesame openthedoor ourpassword p@ssw0rd p@ssword pa55word pass passw0rd
password passwordpassword passwort plastic plastics plasticshed pleasechange
pleaseletmein poiuytrewq princess q1w2e3r4t5 q1w2e3r4t5y6 qazwsx qazwsxedc qwaszx
qwe123qwe123 qweasd qweasdzxc qwer1234qwer qwerty qwertyqwerty qwertyuiop qwertz qwertzuiop
rangers realmadrid recycle recycling robert root rootroot saltmarsh saltmarshplastics samantha
scotland secret secretpassword september soccer softball somebody something spiderman
spring stephanie strawberry summer sunday sunshine superadmin superuser
sweetheart temppassword test tester testing testpassword testtest testuser texas thepassword
thomas tobeornottobe together topsecret trustno trustnoone user username verysecret victoria
volleyball volunteer volunteers warcraft welcome welcomeback welcomehome welcometo whatever
winter word workshop wsxedcrfv yourpassword zaq12wsxcde3
zaq1xsw2cde3 zxcvbn zxcvbnm
`;

export const COMMON_PASSWORDS: ReadonlySet<string> = new Set(WORDS.trim().split(/\s+/));
